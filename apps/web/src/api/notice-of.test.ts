import { describe, expect, it } from 'vitest'
import { noticeOf } from './notice-of'

const refusal = (fields: Record<string, string>) => ({ message: 'Please fill this in.', fields })

describe('the notice of a form', () => {
  it('says a refusal that is about no field', () => {
    expect(noticeOf(refusal({}), { beside: ['name'] })).toBe('Please fill this in.')
  })

  it('leaves to a field what it says beside itself', () => {
    expect(noticeOf(refusal({ name: 'Please fill this in.' }), { beside: ['name'] })).toBeNull()
  })

  it('counts a field as shown where what it is part of is', () => {
    const problem = refusal({ 'refundTiers.0.refundBasisPoints': 'At most 10000.' })
    expect(noticeOf(problem, { beside: ['refundTiers'] })).toBeNull()
    expect(noticeOf(problem, { beside: ['refund'] })).toBe('At most 10000.')
  })

  it('says what no field of the form says', () => {
    const problem = refusal({ name: 'Please fill this in.', handicap: 'At most 54.' })
    expect(noticeOf(problem, { beside: ['name'] })).toBe('At most 54.')
  })

  it('names each field once, and says a sentence once', () => {
    const problem = refusal({ name: 'Fill in.', place: 'Fill in.', slug: 'Small letters only.' })
    const named = { name: 'Name', place: 'Place', slug: 'Address' }
    expect(noticeOf(problem, { named })).toBe('Name, Place: Fill in. Address: Small letters only.')
  })
})
