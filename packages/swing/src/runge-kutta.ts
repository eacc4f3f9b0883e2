/**
 * Dormand and Prince's pair of embedded Runge-Kutta formulas (1980): one of order 5, and one of
 * order 4 whose difference from it says how far a step may err. Written for a ball: where it is
 * follows from how fast it goes, and nothing depends on where it is.
 */

/** What a ball's forces depend on: its velocity in m/s and its spin in rad/s; or their rates. */
export type Motion = readonly [vx: number, vy: number, vz: number, spin: number]

/** How fast each part of a motion changes. */
export type Rate = (motion: Motion) => Motion

/** A ball at one moment: where it is, its motion, and how that changes. */
export interface Moment {
  seconds: number
  x: number
  y: number
  z: number
  motion: Motion
  rate: Motion
}

/** Where a step leads, and by how much its velocity may err, in m/s. */
export interface Step {
  to: Moment
  error: number
}

/** What each slope counts in a stage. */
type Weights = readonly [number, number, number, number, number, number]

const SECOND: Weights = [1 / 5, 0, 0, 0, 0, 0]
const THIRD: Weights = [3 / 40, 9 / 40, 0, 0, 0, 0]
const FOURTH: Weights = [44 / 45, -56 / 15, 32 / 9, 0, 0, 0]
const FIFTH: Weights = [19372 / 6561, -25360 / 2187, 64448 / 6561, -212 / 729, 0, 0]
const SIXTH: Weights = [9017 / 3168, -355 / 33, 46732 / 5247, 49 / 176, -5103 / 18656, 0]
const RESULT: Weights = [35 / 384, 0, 500 / 1113, 125 / 192, -2187 / 6784, 11 / 84]
/** Of the two orders, with the last slope, that of the result, apart. */
const DIFFERENCE: Weights = [71 / 57600, 0, -71 / 16695, 71 / 1920, -17253 / 339200, 22 / 525]
const DIFFERENCE_LAST = -1 / 40

/** The moment at which a ball begins. */
export const beginning = (motion: Motion, rate: Rate): Moment => ({
  seconds: 0,
  x: 0,
  y: 0,
  z: 0,
  motion,
  rate: rate(motion),
})

/** Takes one step of order 5; how far it may err is its difference from the step of order 4. */
export function stepFrom(from: Moment, seconds: number, rateOf: Rate): Step {
  const { motion: s1, rate: k1 } = from
  const s2 = followed(s1, seconds, SECOND, k1, k1, k1, k1, k1)
  const k2 = rateOf(s2)
  const s3 = followed(s1, seconds, THIRD, k1, k2, k1, k1, k1)
  const k3 = rateOf(s3)
  const s4 = followed(s1, seconds, FOURTH, k1, k2, k3, k1, k1)
  const k4 = rateOf(s4)
  const s5 = followed(s1, seconds, FIFTH, k1, k2, k3, k4, k1)
  const k5 = rateOf(s5)
  const s6 = followed(s1, seconds, SIXTH, k1, k2, k3, k4, k5)
  const k6 = rateOf(s6)
  const motion = followed(s1, seconds, RESULT, k1, k2, k3, k4, k5, k6)
  const rate = rateOf(motion)
  // Places follow from the velocities of the same stages.
  const placed = (axis: 0 | 1 | 2): number => seconds * sumOf(RESULT, axis, s1, s2, s3, s4, s5, s6)
  const errorOf = (axis: 0 | 1 | 2): number =>
    Math.abs(sumOf(DIFFERENCE, axis, k1, k2, k3, k4, k5, k6) + DIFFERENCE_LAST * rate[axis])
  return {
    to: {
      seconds: from.seconds + seconds,
      x: from.x + placed(0),
      y: from.y + placed(1),
      z: from.z + placed(2),
      motion,
      rate,
    },
    error: seconds * Math.max(errorOf(0), errorOf(1), errorOf(2)),
  }
}

function followed(
  from: Motion,
  seconds: number,
  weights: Weights,
  k1: Motion,
  k2: Motion,
  k3: Motion,
  k4: Motion,
  k5: Motion,
  k6: Motion = k1,
): Motion {
  return [
    from[0] + seconds * sumOf(weights, 0, k1, k2, k3, k4, k5, k6),
    from[1] + seconds * sumOf(weights, 1, k1, k2, k3, k4, k5, k6),
    from[2] + seconds * sumOf(weights, 2, k1, k2, k3, k4, k5, k6),
    from[3] + seconds * sumOf(weights, 3, k1, k2, k3, k4, k5, k6),
  ]
}

const sumOf = (
  w: Weights,
  part: 0 | 1 | 2 | 3,
  k1: Motion,
  k2: Motion,
  k3: Motion,
  k4: Motion,
  k5: Motion,
  k6: Motion,
): number =>
  w[0] * k1[part] +
  w[1] * k2[part] +
  w[2] * k3[part] +
  w[3] * k4[part] +
  w[4] * k5[part] +
  w[5] * k6[part]

/** By how much the next step may be longer, for an order of 5; never by more than a factor of 4. */
export function stretchOf({ tolerance, error }: { tolerance: number; error: number }): number {
  return error === 0 ? 4 : Math.min(4, Math.max(0.2, 0.9 * (tolerance / error) ** 0.2))
}
