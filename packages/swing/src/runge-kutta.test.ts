import { expect, it } from 'vitest'
import { Stepper, stretchOf, type Rate } from './runge-kutta'

/** A pendulum that swings for ever: x″ = −x, whose state at any time is known. */
const swinging: Rate = (state, into) => {
  into[0] = state[1]!
  into[1] = -state[0]!
}

function errorAfter(steps: number): number {
  const stepper = new Stepper(swinging, 2)
  let state = Float64Array.of(1, 0)
  for (let taken = 0; taken < steps; taken += 1) {
    stepper.take(state, 4 / steps)
    state = Float64Array.from(stepper.result)
  }
  return Math.hypot(state[0]! - Math.cos(4), state[1]! + Math.sin(4))
}

it('is of order 5: half the step, a thirty-second of the error', () => {
  for (const steps of [10, 20, 40]) {
    const order = Math.log2(errorAfter(steps) / errorAfter(2 * steps))
    expect(order).toBeGreaterThan(4.8)
    expect(order).toBeLessThan(5.4)
  }
})

it('knows how far it may err', () => {
  const stepper = new Stepper(swinging, 2)
  const said = stepper.take(Float64Array.of(1, 0), 0.5)
  const really = Math.abs(stepper.result[0]! - Math.cos(0.5))
  expect(said).toBeGreaterThan(really)
})

it('takes longer steps where it errs less, within bounds', () => {
  expect(stretchOf({ tolerance: 1e-4, error: 0 })).toBe(4)
  expect(stretchOf({ tolerance: 1e-4, error: 1e-4 })).toBeCloseTo(0.9, 9)
  expect(stretchOf({ tolerance: 1e-4, error: 1 })).toBe(0.2)
})
