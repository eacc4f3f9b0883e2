/** Whole years between a birth date and a day, both local dates ("2016-05-02"). */
export function ageOn(bornOn: string, dayLocal: string): number {
  const [bornYear, bornRest] = splitYear(bornOn)
  const [year, rest] = splitYear(dayLocal)
  return year - bornYear - (rest < bornRest ? 1 : 0)
}

function splitYear(day: string): [number, string] {
  return [Number(day.slice(0, 4)), day.slice(5)]
}

export const ADULT_AGE_YEARS = 18

/** Says whether somebody is a junior on a day; without a birth date, whoever has a guardian is. */
export function isMinor(
  golfer: { bornOn: string | null; guardianAccountId: string | null },
  dayLocal: string,
): boolean {
  if (golfer.bornOn) return ageOn(golfer.bornOn, dayLocal) < ADULT_AGE_YEARS
  return golfer.guardianAccountId !== null
}

export function contactOf(golfer: {
  emergencyName: string | null
  emergencyPhone: string | null
}): { name: string; phone: string } | null {
  if (!golfer.emergencyName || !golfer.emergencyPhone) return null
  return { name: golfer.emergencyName, phone: golfer.emergencyPhone }
}

export interface Fitting {
  handicapMin: number | null
  handicapMax: number | null
  ageMin: number | null
  ageMax: number | null
}

export type Misfit =
  'too-young' | 'too-old' | 'age-unknown' | 'handicap-outside' | 'handicap-unknown'

/**
 * Says why a golfer does not fit a clinic's level, or null when they do. An age is asked for only
 * where the clinic has one; an adult with an account and no birth date counts as 18.
 */
export function misfitOf(
  golfer: { bornOn: string | null; handicap: number | null; isAccountHolder: boolean },
  clinic: Fitting,
  dayLocal: string,
): Misfit | null {
  const ageMin = clinic.ageMin ?? 0
  const ageMax = clinic.ageMax ?? Number.POSITIVE_INFINITY
  const assumed = golfer.isAccountHolder ? ADULT_AGE_YEARS : null
  const age = golfer.bornOn ? ageOn(golfer.bornOn, dayLocal) : assumed
  if (clinic.ageMin !== null || clinic.ageMax !== null) {
    if (age === null) return 'age-unknown'
    const isGrownUpWithoutDate = golfer.bornOn === null && ageMin >= ADULT_AGE_YEARS
    if (age < ageMin && !isGrownUpWithoutDate) return 'too-young'
    if (age > ageMax) return 'too-old'
  }
  if (clinic.handicapMin === null && clinic.handicapMax === null) return null
  if (golfer.handicap === null) return 'handicap-unknown'
  const isTooLow = clinic.handicapMin !== null && golfer.handicap < clinic.handicapMin
  const isTooHigh = clinic.handicapMax !== null && golfer.handicap > clinic.handicapMax
  return isTooLow || isTooHigh ? 'handicap-outside' : null
}

/** The sentence that a golfer reads. */
export function misfitSentence(misfit: Misfit, name: string, clinic: Fitting): string {
  switch (misfit) {
    case 'too-young':
      return `${name} is too young for this clinic: it is for ages ${ageRange(clinic)}.`
    case 'too-old':
      return `${name} is too old for this clinic: it is for ages ${ageRange(clinic)}.`
    case 'age-unknown':
      return `This clinic is for ages ${ageRange(clinic)}. Please give ${name}'s date of birth first.`
    case 'handicap-outside':
      return `This clinic is for ${handicapRange(clinic)}, which does not fit ${name}.`
    case 'handicap-unknown':
      return `This clinic is for ${handicapRange(clinic)}. Please give ${name}'s handicap first.`
  }
}

function ageRange({ ageMin, ageMax }: Fitting): string {
  if (ageMin !== null && ageMax !== null) return `${ageMin} to ${ageMax}`
  return ageMin !== null ? `${ageMin} and up` : `up to ${ageMax}`
}

function handicapRange({ handicapMin, handicapMax }: Fitting): string {
  if (handicapMin !== null && handicapMax !== null) {
    return `handicaps ${handicapMin} to ${handicapMax}`
  }
  return handicapMin !== null
    ? `handicap ${handicapMin} and up`
    : `handicap ${handicapMax} and under`
}
