import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { divideHalfUp } from './rounding'
import { taxAdded, taxIncluded } from './tax'

const amountMinor = fc.integer({ min: -100_000_000, max: 100_000_000 })
const rateBasisPoints = fc.integer({ min: 0, max: 5_000 })

describe('taxIncluded', () => {
  // 20 %, pence, half-up [D].
  it.each([
    [1_000, 167],
    [999, 167],
    [4_999, 833],
    [10_000, 1_667],
  ])('finds in %i at 20 %% the tax %i', (amount, tax) => {
    expect(taxIncluded({ amountMinor: amount, rateBasisPoints: 2_000 })).toEqual({
      netMinor: amount - tax,
      taxMinor: tax,
      grossMinor: amount,
    })
  })

  it('is within half a unit of the exact tax, in whole numbers', () => {
    fc.assert(
      fc.property(amountMinor, rateBasisPoints, (amount, rate) => {
        const { netMinor, taxMinor, grossMinor } = taxIncluded({
          amountMinor: amount,
          rateBasisPoints: rate,
        })
        expect(netMinor + taxMinor).toBe(grossMinor)
        expect(grossMinor).toBe(amount)
        const error = taxMinor * (10_000 + rate) - amount * rate
        expect(Math.abs(2 * error)).toBeLessThanOrEqual(10_000 + rate)
      }),
    )
  })
})

describe('taxAdded', () => {
  // 6.25 % half-up, Streamlined Sales and Use Tax Agreement §324 [2].
  it('adds to 10.99 at 6.25 % the tax 0.69', () => {
    expect(taxAdded({ amountMinor: 1_099, rateBasisPoints: 625 })).toEqual({
      netMinor: 1_099,
      taxMinor: 69,
      grossMinor: 1_168,
    })
  })

  it('is within half a unit of the exact tax', () => {
    fc.assert(
      fc.property(amountMinor, rateBasisPoints, (amount, rate) => {
        const { netMinor, taxMinor, grossMinor } = taxAdded({
          amountMinor: amount,
          rateBasisPoints: rate,
        })
        expect(netMinor + taxMinor).toBe(grossMinor)
        expect(netMinor).toBe(amount)
        expect(Math.abs(2 * (taxMinor * 10_000 - amount * rate))).toBeLessThanOrEqual(10_000)
      }),
    )
  })
})

describe('both ways', () => {
  it('reverse exactly when the sign turns', () => {
    fc.assert(
      fc.property(amountMinor, rateBasisPoints, (amount, rate) => {
        for (const taxOf of [taxIncluded, taxAdded]) {
          const sale = taxOf({ amountMinor: amount, rateBasisPoints: rate })
          const back = taxOf({ amountMinor: -amount, rateBasisPoints: rate })
          expect(back.taxMinor + sale.taxMinor).toBe(0)
          expect(back.netMinor + sale.netMinor).toBe(0)
        }
      }),
    )
  })

  it('take nothing at a rate of nothing, and refuse rates that are none', () => {
    for (const taxOf of [taxIncluded, taxAdded]) {
      expect(taxOf({ amountMinor: 999, rateBasisPoints: 0 }).taxMinor).toBe(0)
      for (const wrong of [-1, 0.5, NaN]) {
        expect(() => taxOf({ amountMinor: 999, rateBasisPoints: wrong })).toThrow(RangeError)
      }
    }
  })
})

describe('divideHalfUp', () => {
  // 1.235 → 1.24 [2]; the rest [D].
  it.each([
    [1_235n, 10n, 124n],
    [1_234n, 10n, 123n],
    [1n, 2n, 1n],
    [-1n, 2n, -1n],
    [-1_235n, 10n, -124n],
    [-1_234n, 10n, -123n],
    [0n, 7n, 0n],
  ])('makes of %i / %i %i', (dividend, divisor, quotient) => {
    expect(divideHalfUp(dividend, divisor)).toBe(quotient)
  })

  it('refuses to divide by nothing or less', () => {
    expect(() => divideHalfUp(1n, 0n)).toThrow(RangeError)
    expect(() => divideHalfUp(1n, -2n)).toThrow(RangeError)
  })
})
