import { expect, it } from 'vitest'
import { Stepper, stretchOf, type Rate } from './runge-kutta'

/** A pendulum that swings for ever: vx″ = −vx, whose motion at any time is known. */
const swinging: Rate = (motion, into) => {
  into.vx = motion.vz
  into.vz = -motion.vx
}

const pushed = { vx: 1, vy: 0, vz: 0, spin: 0 }

function errorAfter(steps: number): number {
  const stepper = new Stepper(swinging)
  let moment = stepper.begin({ ...pushed })
  for (let taken = 0; taken < steps; taken += 1) {
    stepper.take(moment, 4 / steps)
    moment = stepper.keep(moment)
  }
  const { vx, vz } = moment.motion
  return Math.hypot(vx - Math.cos(4), vz + Math.sin(4))
}

it('is of order 5: half the step, a thirty-second of the error', () => {
  for (const steps of [10, 20, 40]) {
    const order = Math.log2(errorAfter(steps) / errorAfter(2 * steps))
    expect(order).toBeGreaterThan(4.8)
    expect(order).toBeLessThan(5.4)
  }
})

it('follows the way that the motion makes, to the same order', () => {
  const way = (steps: number) => {
    const stepper = new Stepper(swinging)
    let moment = stepper.begin({ ...pushed })
    for (let taken = 0; taken < steps; taken += 1) {
      stepper.take(moment, 4 / steps)
      moment = stepper.keep(moment)
    }
    return Math.abs(moment.x - Math.sin(4))
  }
  expect(Math.log2(way(20) / way(40))).toBeGreaterThan(4.6)
})

it('knows how far it may err', () => {
  const stepper = new Stepper(swinging)
  const said = stepper.take(stepper.begin({ ...pushed }), 0.5)
  const really = Math.abs(stepper.next.motion.vx - Math.cos(0.5))
  expect(said).toBeGreaterThan(really)
})

it('takes longer steps where it errs less, within bounds', () => {
  expect(stretchOf({ tolerance: 1e-4, error: 0 })).toBe(4)
  expect(stretchOf({ tolerance: 1e-4, error: 1e-4 })).toBeCloseTo(0.9, 9)
  expect(stretchOf({ tolerance: 1e-4, error: 1 })).toBe(0.2)
})
