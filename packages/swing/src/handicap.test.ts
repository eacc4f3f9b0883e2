import { describe, expect, it } from 'vitest'
import {
  capRise,
  courseHandicapOf,
  differentialOf,
  exceptionalReduction,
  handicapFrom,
  toTenth,
} from './handicap'

describe('a score’s differential', () => {
  // Rules of Handicapping 5.1 [S]; the example [2].
  it('is 19.0 for 94 where the rating is 73.0 and the slope 125', () => {
    const score = { adjustedGross: 94, courseRating: 73, slopeRating: 125, conditions: 0 }
    expect(differentialOf(score)).toBe(19)
  })

  // Rule 5.1c [S].
  it.each([
    [-1.55, -1.5],
    [1.55, 1.6],
    [-0.04, 0],
    [0.05, 0.1],
  ])('%d is written %d', (value, written) => {
    expect(toTenth(value)).toBe(written)
  })
})

describe('the estimate', () => {
  const flat = (count: number, value: number) => Array.from({ length: count }, () => value)

  // Rule 5.2b [S]: of twenty the lowest eight.
  it('is the mean of the lowest eight of the latest twenty', () => {
    const differentials = [...flat(5, 0), ...flat(12, 20), ...flat(8, 10)]
    expect(handicapFrom({ differentials })).toBe(10)
  })

  // Fewer scores [M].
  it.each([
    [2, null],
    [3, 8],
    [4, 9],
    [5, 10],
    [6, 9],
    [7, 10],
    [19, 10],
  ])('of %d equal scores of 10', (count, handicap) => {
    expect(handicapFrom({ differentials: flat(count, 10) })).toBe(handicap)
  })

  it.each([
    [6, 2, -1],
    [8, 2, 0],
    [9, 3, 0],
    [11, 3, 0],
    [12, 4, 0],
    [14, 4, 0],
    [15, 5, 0],
    [16, 5, 0],
    [17, 6, 0],
    [18, 6, 0],
    [19, 7, 0],
    [20, 8, 0],
  ])('of %d scores counts the lowest %d', (count, lowest, adjustment) => {
    const differentials = Array.from({ length: count }, (_, index) => index + 1)
    expect(handicapFrom({ differentials })).toBe(toTenth((lowest + 1) / 2 + adjustment))
  })

  it('is 54.0 at most [M]', () => {
    expect(handicapFrom({ differentials: flat(20, 70) })).toBe(54)
  })

  // Caps [S inputs, D].
  it.each([
    [11.6, 6.5, 10.6],
    [13.4, 10, 13.2],
    [18.2, 10.2, 15.2],
    [13, 10, 13],
    [4, 10, 4],
  ])('of %d over a lowest of %d rises to %d', (to, lowest, capped) => {
    expect(capRise({ to, lowest })).toBe(capped)
  })

  // Exceptional scores [M].
  it.each([
    [5.1, 12, 0],
    [5, 12, -1],
    [2.1, 12, -1],
    [2, 12, -2],
  ])('goes down after %d by a handicap of %d', (differential, handicap, reduction) => {
    expect(exceptionalReduction({ differential, handicap })).toBe(reduction)
  })
})

// The example [2].
it('gives a course handicap that is not rounded before the next figure', () => {
  const course = courseHandicapOf({ handicap: 27.7, slopeRating: 129, courseRating: 71.1, par: 72 })
  expect(course).toBeCloseTo(30.722, 3)
  expect(Math.round(course * 0.85)).toBe(26)
})
