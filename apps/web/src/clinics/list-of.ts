/** "Range bays", "Putting green and range", "a, b and c". */
export function listOf(names: readonly string[]): string {
  if (names.length < 2) return names[0] ?? ''
  return `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}`
}
