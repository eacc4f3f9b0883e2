import { describe, expect, it } from 'vitest'
import { ellipseOf, ellipseOfCovariance, factorFor, limitsOf } from './dispersion'

describe('the ellipse of shots', () => {
  // Covariance [[1, .5], [.5, 2]] with a factor of 5.9915 [D]: 2.1796, 3.6365, 67.5°, area 24.900.
  it('has the axes of its covariance', () => {
    const ellipse = ellipseOfCovariance({ xx: 1, xy: 0.5, yy: 2 }, 5.9915)
    expect(ellipse.semiMinor).toBeCloseTo(2.1796, 4)
    expect(ellipse.semiMajor).toBeCloseTo(3.6365, 4)
    expect(ellipse.angleDeg).toBeCloseTo(67.5, 6)
    expect(Math.PI * ellipse.semiMajor * ellipse.semiMinor).toBeCloseTo(24.9, 2)
  })

  // 2(n−1)(n+1)/(n(n−2))·F.95(2, n−2) [D].
  it.each([
    [10, 11.036],
    [20, 7.879],
  ])('is the wider the fewer there are: %d', (shots, factor) => {
    expect(factorFor(shots)).toBeCloseTo(factor, 3)
  })

  it('comes down to 5.9915 with very many, and is none with two', () => {
    expect(factorFor(1_000_000)).toBeCloseTo(5.9915, 3)
    expect(
      ellipseOf([
        { x: 0, y: 0 },
        { x: 1, y: 1 },
      ]),
    ).toBeNull()
  })

  it('lies along shots that lie on a line', () => {
    const ellipse = ellipseOf([
      { x: 0, y: 0 },
      { x: 1, y: 1 },
      { x: 2, y: 2 },
      { x: 3, y: 3 },
    ])
    expect(ellipse?.centre).toEqual({ x: 1.5, y: 1.5 })
    expect(ellipse?.angleDeg).toBeCloseTo(45, 6)
    expect(ellipse?.semiMinor).toBeCloseTo(0, 6)
  })
})

describe('limits of single values', () => {
  // Mean ± 2.66 × mean moving range [M].
  it('are the mean and 2.66 mean moving ranges', () => {
    expect(limitsOf([10, 12, 11, 15])).toEqual({
      mean: 12,
      lower: 12 - (2.66 * 7) / 3,
      upper: 12 + (2.66 * 7) / 3,
    })
    expect(limitsOf([10])).toBeNull()
  })
})
