/** A small generator with a fixed seed (mulberry32), so that the demo is the same every time. */
export interface Random {
  /** From 0 to before 1. */
  next(): number
  /** A whole number from `from` to `to`, both included. */
  between(from: number, to: number): number
  chance(share: number): boolean
  pick<T>(items: readonly T[]): T
  shuffle<T>(items: readonly T[]): T[]
}

export function makeRandom(seed: number): Random {
  let state = seed >>> 0
  const next = (): number => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state)
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296
  }
  const between = (from: number, to: number) => from + Math.floor(next() * (to - from + 1))
  return {
    next,
    between,
    chance: (share) => next() < share,
    pick(items) {
      const item = items[between(0, items.length - 1)]
      if (item === undefined) throw new RangeError('There is nothing to pick from.')
      return item
    },
    shuffle(items) {
      const mixed = [...items]
      for (let last = mixed.length - 1; last > 0; last -= 1) {
        const other = between(0, last)
        const [a, b] = [mixed[last], mixed[other]]
        // Both places are within the array.
        mixed[last] = b as (typeof mixed)[number]
        mixed[other] = a as (typeof mixed)[number]
      }
      return mixed
    },
  }
}
