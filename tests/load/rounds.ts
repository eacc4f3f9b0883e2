/** What one measurement found: the product beside a floor that was measured in the same run. */
export interface Finding {
  name: string
  unit: string
  ours: number
  floor: number
  /** `ours` by `floor`, whichever way is better. */
  ratio: number
  goal: { at: 'least' | 'most'; ratio: number }
  isMet: boolean
}

export function find(given: Omit<Finding, 'ratio' | 'isMet'>): Finding {
  const ratio = given.ours / given.floor
  const { at, ratio: wanted } = given.goal
  return { ...given, ratio, isMet: at === 'least' ? ratio >= wanted : ratio <= wanted }
}

/**
 * Takes each measure in turn, round after round, so that all of them meet the same machine, and
 * resolves to the median of each. The first round warms up and is thrown away.
 */
export async function inTurns<Name extends string>(
  measures: Readonly<Record<Name, () => Promise<number> | number>>,
  rounds: number,
): Promise<Record<Name, number>> {
  // The keys of a record typed by its names are those names.
  const names = Object.keys(measures) as Name[]
  const taken = new Map<Name, number[]>(names.map((name) => [name, []]))
  for (let round = -1; round < rounds; round += 1) {
    // Every other round goes the other way about, so that nobody always comes after the same one.
    const order = round % 2 === 0 ? names : [...names].reverse()
    for (const name of order) {
      const value = await measures[name]()
      if (round >= 0) taken.get(name)?.push(value)
    }
  }
  const medians = names.map((name) => [name, medianOf(taken.get(name) ?? [])])
  return Object.fromEntries(medians) as Record<Name, number>
}

export function medianOf(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b)
  const middle = sorted.length / 2
  const below = sorted[Math.ceil(middle) - 1] ?? NaN
  const above = sorted[Math.floor(middle)] ?? NaN
  return (below + above) / 2
}
