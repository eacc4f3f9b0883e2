import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { USUAL_ERROR_DEG, changeOf, type Readings } from './change'

const single = (valueDeg: number, errorDeg: number): Readings => ({
  valuesDeg: [valueDeg],
  errorDeg,
})

describe('the smallest change that counts', () => {
  // MDC95 = 1.96·√2·SEM [D].
  it.each([
    [2, 5.54],
    [3, 8.32],
    [4, 11.09],
    [5, 13.86],
  ])('of two single readings with an error of %d° each', (errorDeg, leastDeg) => {
    const change = changeOf({ of: single(0, errorDeg), against: single(0, errorDeg) })
    // 8.315 is written 8.32 in the source.
    expect(Math.abs(change.leastDeg - leastDeg)).toBeLessThan(0.006)
    expect(change.by).toBe('measuring')
  })

  it('of 12° is beyond a sensor’s error and within a goniometer’s', () => {
    // Reissner et al. 2019 [S, abstract]: sensors 2 to 4°, goniometers 4 to 11°.
    const of = (errorDeg: number) =>
      changeOf({ of: single(-6, errorDeg), against: single(-18, errorDeg) })
    expect(of(USUAL_ERROR_DEG.sensor)).toMatchObject({ differenceDeg: 12, isChange: true })
    expect(of(USUAL_ERROR_DEG.goniometer).isChange).toBe(false)
  })

  it('of two methods has both errors in it, and of a target only one', () => {
    const both = changeOf({ of: single(0, 3), against: single(0, 6) })
    expect(both.leastDeg).toBeCloseTo(1.96 * Math.sqrt(9 + 36), 9)
    const target = changeOf({ of: single(0, 3), against: { targetDeg: 0 } })
    expect(target.leastDeg).toBeCloseTo(1.96 * 3, 9)
  })

  it('of means is smaller: 1.96·SEM·√(1/n + 1/m)', () => {
    const change = changeOf({
      of: { valuesDeg: [4, 4], errorDeg: 3 },
      against: { valuesDeg: [1, 1, 1, 1], errorDeg: 3 },
    })
    expect(change.leastDeg).toBeCloseTo(1.96 * 3 * Math.sqrt(1 / 2 + 1 / 4), 9)
  })
})

describe('a player’s own spread', () => {
  // Welch's interval: means 14 and 10, variances 10 and 2.5 over five swings each, so that the
  // standard error is √2.5, with 5.882 degrees of freedom and t = 2.4588 [D].
  it('decides where it is the wider', () => {
    const change = changeOf({
      of: { valuesDeg: [10, 12, 14, 16, 18], errorDeg: 0.1 },
      against: { valuesDeg: [8, 9, 10, 11, 12], errorDeg: 0.1 },
    })
    expect(change.by).toBe('spread')
    expect(change.leastDeg).toBeCloseTo(2.4588 * Math.sqrt(2.5), 3)
    expect(change.isChange).toBe(true)
  })

  it('does not count with two swings on a side', () => {
    const change = changeOf({
      of: { valuesDeg: [0, 20], errorDeg: 1 },
      against: { valuesDeg: [8, 9, 10, 11, 12], errorDeg: 1 },
    })
    expect(change.by).toBe('measuring')
  })

  it('never makes a smaller difference count', () => {
    const values = fc.array(fc.double({ min: -60, max: 60, noNaN: true }), {
      minLength: 1,
      maxLength: 8,
    })
    fc.assert(
      fc.property(
        values,
        values,
        fc.double({ min: 0.5, max: 10, noNaN: true }),
        (a, b, errorDeg) => {
          const change = changeOf({
            of: { valuesDeg: a, errorDeg },
            against: { valuesDeg: b, errorDeg },
          })
          const measuring = 1.96 * errorDeg * Math.sqrt(1 / a.length + 1 / b.length)
          expect(change.leastDeg).toBeGreaterThanOrEqual(measuring - 1e-9)
        },
      ),
    )
  })
})
