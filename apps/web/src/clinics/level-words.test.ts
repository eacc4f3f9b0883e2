import { describe, expect, it } from 'vitest'
import { levelChosen, levelOf, rangesOf } from './level-words'

const ranges = (
  ages: [number | null, number | null],
  handicaps: [number | null, number | null],
) => ({
  ageMin: ages[0],
  ageMax: ages[1],
  handicapMin: handicaps[0],
  handicapMax: handicaps[1],
})

describe('whom a clinic is for', () => {
  it.each([
    ['any', ranges([null, null], [null, null])],
    ['adults', ranges([18, null], [null, null])],
    ['adults', ranges([7, null], [null, null])],
    ['adults', ranges([null, 65], [null, null])],
    ['juniors', ranges([7, 10], [null, null])],
    ['juniors', ranges([null, 17], [null, null])],
    ['handicap', ranges([null, null], [-2.5, 10])],
    ['handicap', ranges([null, null], [18, null])],
    ['both', ranges([18, null], [null, 36])],
    ['both', ranges([10, 17], [20, 54])],
  ])('is saved as it was when no word is changed: %s, %j', (level, saved) => {
    expect(levelOf(saved).level).toBe(level)
    expect(rangesOf(levelOf(saved))).toEqual(saved)
  })

  it('begins another choice with limits that can be read', () => {
    expect(rangesOf(levelChosen('adults'))).toEqual(ranges([18, null], [null, null]))
    expect(rangesOf(levelChosen('juniors'))).toEqual(ranges([null, 17], [null, null]))
    expect(rangesOf(levelChosen('any'))).toEqual(ranges([null, null], [null, null]))
  })
})
