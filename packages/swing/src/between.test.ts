import fc from 'fast-check'
import { expect, it } from 'vitest'
import { between, placeAt, shareAtNothing, shareAtTurn } from './between'
import type { Moment } from './runge-kutta'

/** A moment of z = c0 + c1·t + … + c5·t⁵. */
function momentOf(c: readonly number[], seconds: number): Moment {
  const sum = (share: (power: number) => number) =>
    c.reduce((total, factor, power) => total + factor * share(power), 0)
  return {
    seconds,
    x: 0,
    y: 0,
    z: sum((power) => seconds ** power),
    motion: [0, 0, sum((power) => (power < 1 ? 0 : power * seconds ** (power - 1))), 0],
    rate: [0, 0, sum((power) => (power < 2 ? 0 : power * (power - 1) * seconds ** (power - 2))), 0],
  }
}

it('is exact for what is no more bent than itself', () => {
  const factor = fc.double({ min: -5, max: 5, noNaN: true })
  fc.assert(
    fc.property(
      fc.tuple(factor, factor, factor, factor, factor, factor),
      fc.double({ min: 0, max: 1, noNaN: true }),
      (factors, share) => {
        const found = placeAt(between(momentOf(factors, 1), momentOf(factors, 3), 'z'), share)
        expect(found).toBeCloseTo(momentOf(factors, 1 + 2 * share).z, 6)
      },
    ),
  )
})

it('finds where a throw turns and where it comes down', () => {
  // z = 10t − 5t²: up until 1 s, down at 2 s.
  const thrown = [0, 10, -5]
  const height = between(momentOf(thrown, 0.5), momentOf(thrown, 2.5), 'z')
  expect(0.5 + 2 * shareAtTurn(height)).toBeCloseTo(1, 9)
  expect(0.5 + 2 * shareAtNothing(height)).toBeCloseTo(2, 9)
})
