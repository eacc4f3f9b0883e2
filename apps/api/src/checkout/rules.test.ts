import { describe, expect, it } from 'vitest'
import { policySentence, registerInWords } from './rules'

describe('the policy in a sentence', () => {
  const tiers = [
    { noticeHours: 0, refundBasisPoints: 0 },
    { noticeHours: 48, refundBasisPoints: 10_000 },
    { noticeHours: 24, refundBasisPoints: 5_000 },
    { noticeHours: 12, refundBasisPoints: 2_500 },
  ]
  it.each([
    { refundBasisPoints: 10_000, sentence: '48 hours or more before: all your money back.' },
    { refundBasisPoints: 5_000, sentence: '24 hours or more before: half your money back.' },
    { refundBasisPoints: 2_500, sentence: '12 hours or more before: 25 % of your money back.' },
    { refundBasisPoints: 0, sentence: 'Less than 12 hours before: no money back.' },
    { refundBasisPoints: 1, sentence: 'Once a session has begun nothing goes back.' },
  ])('for $refundBasisPoints basis points', ({ refundBasisPoints, sentence }) => {
    expect(policySentence({ tiers, refundBasisPoints })).toBe(sentence)
  })

  it('for one tier alone', () => {
    const always = [{ noticeHours: 0, refundBasisPoints: 10_000 }]
    const given = { tiers: always, refundBasisPoints: 10_000 }
    expect(policySentence(given)).toBe('Always: all your money back.')
  })
})

describe('a register in words', () => {
  it('counts each mark that was given', () => {
    const marks = ['present', 'late', 'present', null, 'absent']
    expect(registerInWords(marks)).toBe('Register closed, 2 present, 1 late, 1 absent')
    expect(registerInWords([])).toBe('Register closed')
  })
})
