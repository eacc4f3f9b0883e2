/** Whole years between a birth date and a day, both local dates ("2016-05-02"). */
export function ageOn(bornOn: string, dayLocal: string): number {
  const hadBirthday = dayLocal.slice(5) >= bornOn.slice(5)
  return Number(dayLocal.slice(0, 4)) - Number(bornOn.slice(0, 4)) - (hadBirthday ? 0 : 1)
}
