/**
 * Dormand and Prince's pair of embedded Runge-Kutta formulas (1980): one of order 5, and one of
 * order 4 whose difference from it says how far a step may err.
 */

export type State = Float64Array

/** Writes how fast each part of a state changes into `into`. Depends on nothing but the state. */
export type Rate = (state: State, into: State) => void

/** The rows of the pair's table, and what the last row's two orders differ by. */
const A = [
  [1 / 5],
  [3 / 40, 9 / 40],
  [44 / 45, -56 / 15, 32 / 9],
  [19372 / 6561, -25360 / 2187, 64448 / 6561, -212 / 729],
  [9017 / 3168, -355 / 33, 46732 / 5247, 49 / 176, -5103 / 18656],
  [35 / 384, 0, 500 / 1113, 125 / 192, -2187 / 6784, 11 / 84],
] as const
const E = [71 / 57600, 0, -71 / 16695, 71 / 1920, -17253 / 339200, 22 / 525, -1 / 40] as const

/** A part of a state; each state has all of them. */
export const partOf = (state: State, part: number): number => state[part] ?? Number.NaN

/** Takes steps of a state; its arrays are made once, and the result is overwritten by each step. */
export class Stepper {
  readonly result: State
  readonly #rate: Rate
  readonly #slopes: readonly State[]
  readonly #between: State

  constructor(rate: Rate, size: number) {
    this.#rate = rate
    this.result = new Float64Array(size)
    this.#between = new Float64Array(size)
    this.#slopes = Array.from({ length: E.length }, () => new Float64Array(size))
  }

  /**
   * Takes one step of order 5 from `from` and leaves where it ends in `result`. Gives the largest
   * difference of any part from the step of order 4, in that part's own unit.
   */
  take(from: State, seconds: number): number {
    for (const [row, slope] of this.#slopes.entries()) {
      const shares = A[row - 1]
      const to = row === A.length ? this.result : this.#between
      // The first slope is that of where the step begins.
      if (shares) this.#follow(from, { shares, seconds, to })
      this.#rate(shares ? to : from, slope)
    }
    let worst = 0
    for (let part = 0; part < from.length; part += 1) {
      worst = Math.max(worst, Math.abs(seconds * this.#sum(E, part)))
    }
    return worst
  }

  #follow(from: State, by: { shares: readonly number[]; seconds: number; to: State }): void {
    for (let part = 0; part < from.length; part += 1) {
      by.to[part] = partOf(from, part) + by.seconds * this.#sum(by.shares, part)
    }
  }

  #sum(shares: readonly number[], part: number): number {
    let sum = 0
    for (let row = 0; row < shares.length; row += 1) {
      const slope = this.#slopes[row]
      if (slope) sum += (shares[row] ?? 0) * partOf(slope, part)
    }
    return sum
  }
}

/** By how much the next step may be longer, for an order of 5; never by more than a factor of 4. */
export function stretchOf({ tolerance, error }: { tolerance: number; error: number }): number {
  return error === 0 ? 4 : Math.min(4, Math.max(0.2, 0.9 * (tolerance / error) ** 0.2))
}
