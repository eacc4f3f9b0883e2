import type { Moment } from './runge-kutta'

type Axis = 'x' | 'y' | 'z'
/** Where an axis stands in a motion. */
const PART = { x: 0, y: 1, z: 2 } as const

/**
 * One coordinate between two moments: the polynomial of degree 5 that has the place, the velocity
 * and the acceleration of both. Coefficients of powers of the share of the time that has gone by.
 */
export type Between = readonly [number, number, number, number, number, number]

export function between(from: Moment, to: Moment, axis: Axis): Between {
  const seconds = to.seconds - from.seconds
  const part = PART[axis]
  const [v0, v1] = [from.motion[part] * seconds, to.motion[part] * seconds]
  const [a0, a1] = [from.rate[part] * seconds ** 2, to.rate[part] * seconds ** 2]
  const way = to[axis] - from[axis]
  return [
    from[axis],
    v0,
    a0 / 2,
    10 * way - 6 * v0 - 4 * v1 - 1.5 * a0 + 0.5 * a1,
    -15 * way + 8 * v0 + 7 * v1 + 1.5 * a0 - a1,
    6 * way - 3 * v0 - 3 * v1 - 0.5 * a0 + 0.5 * a1,
  ]
}

/** The coordinate at a share of the time, 0 to 1. */
export const placeAt = ([c0, c1, c2, c3, c4, c5]: Between, share: number): number =>
  c0 + share * (c1 + share * (c2 + share * (c3 + share * (c4 + share * c5))))

/** How fast it changes there, by share. */
export const slopeAt = ([, c1, c2, c3, c4, c5]: Between, share: number): number =>
  c1 + share * (2 * c2 + share * (3 * c3 + share * (4 * c4 + share * 5 * c5)))

const bendAt = ([, , c2, c3, c4, c5]: Between, share: number): number =>
  2 * c2 + share * (6 * c3 + share * (12 * c4 + share * 20 * c5))

const MOST_TURNS = 20
const NOTHING = 1e-12

/** The share at which the coordinate is nothing, by Newton's method from its end. */
export const shareAtNothing = (of: Between): number =>
  newton(1, (share) => placeAt(of, share) / slopeAt(of, share))

/** The share at which it turns back. */
export const shareAtTurn = (of: Between): number =>
  newton(0.5, (share) => slopeAt(of, share) / bendAt(of, share))

function newton(start: number, stepOf: (share: number) => number): number {
  let share = start
  for (let turn = 0; turn < MOST_TURNS; turn += 1) {
    const step = stepOf(share)
    share -= step
    if (Math.abs(step) < NOTHING) break
  }
  return share
}
