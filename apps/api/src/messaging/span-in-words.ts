const COUNTS = 'no one two three four five six seven eight nine ten'.split(' ')

/** A span of time as a letter says it: "one hour", "seven days". Whole days are days. */
export function spanInWords({ hours }: { hours: number }): string {
  const [count, unit] = hours >= 24 && hours % 24 === 0 ? [hours / 24, 'day'] : [hours, 'hour']
  return `${COUNTS[count] ?? count} ${unit}${count === 1 ? '' : 's'}`
}
