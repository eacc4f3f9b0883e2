import { expect, it } from 'vitest'
import { wrongParts } from './refund-tiers'

it('says what is wrong with a step in the units that were typed', () => {
  const wrong = wrongParts({
    'refundTiers.1.refundBasisPoints': 'This is too large or too long: at most 10000.',
    'refundTiers.0.noticeHours': 'This should be int.',
    waiver: 'This is longer than 2000 characters.',
  })
  expect([...wrong]).toEqual([
    ['1.refundBasisPoints', 'Step 2: the share that comes back is 0 to 100 %.'],
    ['0.noticeHours', 'Step 1: notice is 0 to 1440 whole hours.'],
  ])
})

it('passes on what is said of the steps as a whole', () => {
  expect([...wrongParts({ refundTiers: 'At least 1.' })]).toEqual([['', 'At least 1.']])
})
