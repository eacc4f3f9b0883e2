/**
 * Dormand and Prince's pair of embedded Runge-Kutta formulas (1980): one of order 5, and one of
 * order 4 whose difference from it says how far a step may err. Written for a ball: where it is
 * follows from how fast it goes, and nothing depends on where it is.
 */

/** What a ball's forces depend on: its velocity in m/s and its spin in rad/s; or their rates. */
export interface Motion {
  vx: number
  vy: number
  vz: number
  spin: number
}

/** Writes how fast each part of a motion changes into `into`. */
export type Rate = (motion: Motion, into: Motion) => void

/** A ball at one moment: where it is, its motion, and how that changes. */
export interface Moment {
  seconds: number
  x: number
  y: number
  z: number
  motion: Motion
  rate: Motion
}

/** How much each slope counts in a stage, or in the difference of the two orders. */
interface Weights {
  a1: number
  a2: number
  a3: number
  a4: number
  a5: number
  a6: number
}

const weights = (...given: number[]): Weights => {
  const [a1 = 0, a2 = 0, a3 = 0, a4 = 0, a5 = 0, a6 = 0] = given
  return { a1, a2, a3, a4, a5, a6 }
}

const SECOND = weights(1 / 5)
const THIRD = weights(3 / 40, 9 / 40)
const FOURTH = weights(44 / 45, -56 / 15, 32 / 9)
const FIFTH = weights(19372 / 6561, -25360 / 2187, 64448 / 6561, -212 / 729)
const SIXTH = weights(9017 / 3168, -355 / 33, 46732 / 5247, 49 / 176, -5103 / 18656)
const RESULT = weights(35 / 384, 0, 500 / 1113, 125 / 192, -2187 / 6784, 11 / 84)
const DIFFERENCE = weights(71 / 57600, 0, -71 / 16695, 71 / 1920, -17253 / 339200, 22 / 525)
/** Of the last slope, that of the result, in the difference. */
const DIFFERENCE_LAST = -1 / 40

const still = (): Motion => ({ vx: 0, vy: 0, vz: 0, spin: 0 })
const nowhere = (): Moment => ({ seconds: 0, x: 0, y: 0, z: 0, motion: still(), rate: still() })

/** Takes steps of a ball. What it works with is made once; `next` is overwritten by each step. */
export class Stepper {
  readonly #rate: Rate
  /** The motions of the stages in between, and the slopes there. */
  readonly #stages = { s2: still(), s3: still(), s4: still(), s5: still(), s6: still() }
  readonly #slopes = { k2: still(), k3: still(), k4: still(), k5: still(), k6: still() }
  next: Moment = nowhere()

  constructor(rate: Rate) {
    this.#rate = rate
  }

  /** The moment at which a ball begins. */
  begin(motion: Motion): Moment {
    const moment = { ...nowhere(), motion }
    this.#rate(motion, moment.rate)
    return moment
  }

  /**
   * Takes one step of order 5 and leaves where it ends in `next`. Gives the largest difference of
   * any part of the velocity from the step of order 4, in m/s.
   */
  take(from: Moment, seconds: number): number {
    const { s2, s3, s4, s5, s6 } = this.#stages
    const { k2, k3, k4, k5, k6 } = this.#slopes
    const { next } = this
    this.#follow(s2, from, seconds, SECOND)
    this.#rate(s2, k2)
    this.#follow(s3, from, seconds, THIRD)
    this.#rate(s3, k3)
    this.#follow(s4, from, seconds, FOURTH)
    this.#rate(s4, k4)
    this.#follow(s5, from, seconds, FIFTH)
    this.#rate(s5, k5)
    this.#follow(s6, from, seconds, SIXTH)
    this.#rate(s6, k6)
    this.#follow(next.motion, from, seconds, RESULT)
    this.#rate(next.motion, next.rate)
    const { a1, a3, a4, a5, a6 } = RESULT
    const s1 = from.motion
    next.seconds = from.seconds + seconds
    next.x = from.x + seconds * (a1 * s1.vx + a3 * s3.vx + a4 * s4.vx + a5 * s5.vx + a6 * s6.vx)
    next.y = from.y + seconds * (a1 * s1.vy + a3 * s3.vy + a4 * s4.vy + a5 * s5.vy + a6 * s6.vy)
    next.z = from.z + seconds * (a1 * s1.vz + a3 * s3.vz + a4 * s4.vz + a5 * s5.vz + a6 * s6.vz)
    return seconds * this.#difference(from)
  }

  #follow(into: Motion, { motion, rate: k1 }: Moment, seconds: number, w: Weights): void {
    const { k2, k3, k4, k5, k6 } = this.#slopes
    const { a1, a2, a3, a4, a5, a6 } = w
    into.vx =
      motion.vx +
      seconds * (a1 * k1.vx + a2 * k2.vx + a3 * k3.vx + a4 * k4.vx + a5 * k5.vx + a6 * k6.vx)
    into.vy =
      motion.vy +
      seconds * (a1 * k1.vy + a2 * k2.vy + a3 * k3.vy + a4 * k4.vy + a5 * k5.vy + a6 * k6.vy)
    into.vz =
      motion.vz +
      seconds * (a1 * k1.vz + a2 * k2.vz + a3 * k3.vz + a4 * k4.vz + a5 * k5.vz + a6 * k6.vz)
    into.spin =
      motion.spin +
      seconds *
        (a1 * k1.spin + a2 * k2.spin + a3 * k3.spin + a4 * k4.spin + a5 * k5.spin + a6 * k6.spin)
  }

  #difference({ rate: k1 }: Moment): number {
    const { k3, k4, k5, k6 } = this.#slopes
    const k7 = this.next.rate
    const { a1, a3, a4, a5, a6 } = DIFFERENCE
    const a7 = DIFFERENCE_LAST
    return Math.max(
      Math.abs(a1 * k1.vx + a3 * k3.vx + a4 * k4.vx + a5 * k5.vx + a6 * k6.vx + a7 * k7.vx),
      Math.abs(a1 * k1.vy + a3 * k3.vy + a4 * k4.vy + a5 * k5.vy + a6 * k6.vy + a7 * k7.vy),
      Math.abs(a1 * k1.vz + a3 * k3.vz + a4 * k4.vz + a5 * k5.vz + a6 * k6.vz + a7 * k7.vz),
    )
  }

  /** Keeps the step that was taken: gives its moment away, and takes an old one to write on. */
  keep(old: Moment): Moment {
    const kept = this.next
    this.next = old
    return kept
  }
}

/** By how much the next step may be longer, for an order of 5; never by more than a factor of 4. */
export function stretchOf({ tolerance, error }: { tolerance: number; error: number }): number {
  return error === 0 ? 4 : Math.min(4, Math.max(0.2, 0.9 * (tolerance / error) ** 0.2))
}
