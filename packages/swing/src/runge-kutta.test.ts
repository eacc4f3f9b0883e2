import { expect, it } from 'vitest'
import { beginning, stepFrom, stretchOf, type Moment, type Rate } from './runge-kutta'

/** A pendulum that swings for ever: vx″ = −vx, whose motion at any time is known. */
const swinging: Rate = ([vx, , vz]) => [vz, 0, -vx, 0]

function after(steps: number): Moment {
  let moment = beginning([1, 0, 0, 0], swinging)
  for (let taken = 0; taken < steps; taken += 1) {
    moment = stepFrom(moment, 4 / steps, swinging).to
  }
  return moment
}

function errorAfter(steps: number): number {
  const [vx, , vz] = after(steps).motion
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
  const errorOfWay = (steps: number) => Math.abs(after(steps).x - Math.sin(4))
  expect(Math.log2(errorOfWay(20) / errorOfWay(40))).toBeGreaterThan(4.6)
})

it('knows how far it may err', () => {
  const { to, error } = stepFrom(beginning([1, 0, 0, 0], swinging), 0.5, swinging)
  expect(error).toBeGreaterThan(Math.abs(to.motion[0] - Math.cos(0.5)))
})

it('takes longer steps where it errs less, within bounds', () => {
  expect(stretchOf({ tolerance: 1e-4, error: 0 })).toBe(4)
  expect(stretchOf({ tolerance: 1e-4, error: 1e-4 })).toBeCloseTo(0.9, 9)
  expect(stretchOf({ tolerance: 1e-4, error: 1 })).toBe(0.2)
})
