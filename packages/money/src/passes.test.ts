import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { earnedOfPass } from './passes'

describe('earnedOfPass', () => {
  // A pass of ten at 600.00, nine expected to be used [S rule, D numbers].
  it.each([
    [0, 0],
    [1, 6_667],
    [2, 13_333],
    [3, 20_000],
    [8, 53_333],
    [9, 60_000],
    [10, 60_000],
  ])('has earned of ten lessons, after %i, %i', (used, earnedMinor) => {
    expect(earnedOfPass({ priceMinor: 60_000, used, expectedUsed: 9 })).toBe(earnedMinor)
  })

  // A card of 100, 10 expected unused, 45 redeemed [M].
  it('has earned 50 of a card of 100 with 45 of 90 redeemed', () => {
    expect(earnedOfPass({ priceMinor: 10_000, used: 4_500, expectedUsed: 9_000 })).toBe(5_000)
  })

  it('never falls, and ends at the price', () => {
    const count = fc.integer({ min: 1, max: 100 })
    fc.assert(
      fc.property(fc.nat(10_000_000), count, (priceMinor, expectedUsed) => {
        let before = 0
        for (let used = 0; used <= expectedUsed; used += 1) {
          const earned = earnedOfPass({ priceMinor, used, expectedUsed })
          expect(earned).toBeGreaterThanOrEqual(before)
          before = earned
        }
        expect(before).toBe(priceMinor)
      }),
    )
  })

  it('refuses what no pass is', () => {
    const pass = { priceMinor: 100, used: 1, expectedUsed: 2 }
    for (const wrong of [{ priceMinor: -1 }, { used: -1 }, { used: 0.5 }, { expectedUsed: 0 }]) {
      expect(() => earnedOfPass({ ...pass, ...wrong })).toThrow(RangeError)
    }
  })
})
