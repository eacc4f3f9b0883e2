import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { allocateByLargestRemainder, priceOfRemaining, splitRunPrice } from './allocation'

const totalMinor = fc.integer({ min: -1_000_000_000, max: 1_000_000_000 })
const weights = fc
  .array(fc.integer({ min: 0, max: 1_000_000 }), { minLength: 1, maxLength: 40 })
  .filter((all) => all.some((weight) => weight > 0))

describe('allocateByLargestRemainder', () => {
  // The first [S], the second and the rest from the rule itself [D].
  it.each([
    [100, [78.26, 17.39, 4.35], [78, 18, 4]],
    [100, [1, 1, 1], [34, 33, 33]],
    [-100, [1, 1, 1], [-34, -33, -33]],
    [1, [1, 1, 1, 1], [1, 0, 0, 0]],
    [2, [0, 1, 0, 1, 1], [0, 1, 0, 1, 0]],
    [0, [3, 4], [0, 0]],
    [10_800, [1, 1, 1, 1, 1, 1], [1_800, 1_800, 1_800, 1_800, 1_800, 1_800]],
    [5, [0.1, 0.2], [2, 3]],
    [7, [1e-7, 2e-7], [2, 5]],
    [Number.MAX_SAFE_INTEGER, [1, 1], [4_503_599_627_370_496, 4_503_599_627_370_495]],
  ])('gives %i by %j as %j', (total, by, shares) => {
    expect(allocateByLargestRemainder(total, by)).toEqual(shares)
  })

  it('refuses what has no answer', () => {
    for (const wrong of [[], [0], [0, 0], [1, -1], [NaN], [Infinity, 1]]) {
      expect(() => allocateByLargestRemainder(100, wrong)).toThrow(RangeError)
    }
    expect(() => allocateByLargestRemainder(0.5, [1])).toThrow(RangeError)
  })

  it('loses and makes nothing', () => {
    fc.assert(
      fc.property(totalMinor, weights, (total, by) => {
        const shares = allocateByLargestRemainder(total, by)
        expect(shares.reduce((sum, share) => sum + share, 0)).toBe(total)
        expect(shares.length).toBe(by.length)
      }),
    )
  })

  it('is fair: every share is within one unit of the exact one, and zero weighs nothing', () => {
    fc.assert(
      fc.property(totalMinor, weights, (total, by) => {
        const whole = BigInt(by.reduce((sum, weight) => sum + weight, 0))
        allocateByLargestRemainder(total, by).forEach((share, index) => {
          const weight = by[index] ?? 0
          const error = BigInt(share) * whole - BigInt(total) * BigInt(weight)
          expect(error < whole && error > -whole).toBe(true)
          if (weight === 0) expect(share).toBe(0)
        })
      }),
    )
  })

  it('gives the odd units to the largest remainders, ties to the earlier', () => {
    fc.assert(
      fc.property(fc.nat(1_000_000), weights, (total, by) => {
        const whole = by.reduce((sum, weight) => sum + weight, 0)
        const exact = by.map((weight) => (BigInt(total) * BigInt(weight)) / BigInt(whole))
        const left = by.map((weight) => (BigInt(total) * BigInt(weight)) % BigInt(whole))
        const extra = allocateByLargestRemainder(total, by).map(
          (share, index) => BigInt(share) - (exact[index] ?? 0n),
        )
        by.forEach((_, i) => {
          by.forEach((__, j) => {
            const goesFirst = (left[i] ?? 0n) > (left[j] ?? 0n) || (left[i] === left[j] && i < j)
            if (goesFirst) expect((extra[i] ?? 0n) >= (extra[j] ?? 0n)).toBe(true)
          })
        })
      }),
      { numRuns: 50 },
    )
  })

  it('mirrors a total below zero, so that a reversal is exact', () => {
    fc.assert(
      fc.property(totalMinor, weights, (total, by) => {
        const mirrored = allocateByLargestRemainder(-total, by).map((share) => 0 - share)
        expect(mirrored).toEqual(allocateByLargestRemainder(total, by))
      }),
    )
  })

  it('does not depend on the size of the weights', () => {
    fc.assert(
      fc.property(totalMinor, weights, fc.integer({ min: 2, max: 1000 }), (total, by, times) => {
        const scaled = by.map((weight) => weight * times)
        expect(allocateByLargestRemainder(total, scaled)).toEqual(
          allocateByLargestRemainder(total, by),
        )
      }),
    )
  })
})

describe('the price of a run', () => {
  it('is split once, and who joins late pays the rest of that split', () => {
    expect(splitRunPrice({ runPriceMinor: 14_500, sessionCount: 8 })).toEqual([
      1_813, 1_813, 1_813, 1_813, 1_812, 1_812, 1_812, 1_812,
    ])
    const run = { runPriceMinor: 14_500, sessionCount: 8, remainingNumbers: [4, 5, 6, 7, 8] }
    expect(priceOfRemaining(run)).toEqual({
      priceMinor: 9_061,
      sharesMinor: [1_813, 1_812, 1_812, 1_812, 1_812],
    })
  })

  it('leaves out the share of a session that was called off, and no other', () => {
    const run = { runPriceMinor: 10_000, sessionCount: 3, remainingNumbers: [1, 3] }
    expect(priceOfRemaining(run)).toEqual({ priceMinor: 6_667, sharesMinor: [3_334, 3_333] })
  })

  it('is whole at the start and nothing at the end', () => {
    const run = { runPriceMinor: 10_000, sessionCount: 3 }
    expect(priceOfRemaining({ ...run, remainingNumbers: [1, 2, 3] }).priceMinor).toBe(10_000)
    expect(priceOfRemaining({ ...run, remainingNumbers: [] })).toEqual({
      priceMinor: 0,
      sharesMinor: [],
    })
  })

  it('falls with every session that passes, by that session’s price', () => {
    fc.assert(
      fc.property(fc.nat(1_000_000), fc.integer({ min: 1, max: 60 }), (price, sessionCount) => {
        const shares = splitRunPrice({ runPriceMinor: price, sessionCount })
        const numbers = shares.map((_, index) => index + 1)
        for (let passed = 0; passed < sessionCount; passed += 1) {
          const at = (gone: number) =>
            priceOfRemaining({
              runPriceMinor: price,
              sessionCount,
              remainingNumbers: numbers.slice(gone),
            }).priceMinor
          expect(at(passed) - at(passed + 1)).toBe(shares[passed])
        }
      }),
      { numRuns: 40 },
    )
  })

  it('is the allocation by equal weights, of any sign and size', () => {
    const price = fc.oneof(totalMinor, fc.maxSafeInteger())
    fc.assert(
      fc.property(price, fc.integer({ min: 1, max: 60 }), (runPriceMinor, sessionCount) => {
        const byWeights = allocateByLargestRemainder(runPriceMinor, Array(sessionCount).fill(1))
        expect(splitRunPrice({ runPriceMinor, sessionCount })).toEqual(byWeights)
      }),
    )
  })

  it('refuses a run without sessions, and sessions that it does not have', () => {
    expect(() => splitRunPrice({ runPriceMinor: 1, sessionCount: 0 })).toThrow(RangeError)
    for (const remainingNumbers of [[0], [4], [1.5], [2, 2]]) {
      const run = { runPriceMinor: 1, sessionCount: 3, remainingNumbers }
      expect(() => priceOfRemaining(run)).toThrow(RangeError)
    }
  })
})
