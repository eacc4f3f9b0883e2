import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { divideRefund, refundByPolicy } from './refunds'

const HOUR = 3_600_000
const TIERS = [
  { noticeHours: 24, refundBasisPoints: 5_000 },
  { noticeHours: 72, refundBasisPoints: 10_000 },
]

describe('refundByPolicy', () => {
  it.each([
    ['long before', 1_000 * HOUR, 10_000],
    ['at the first deadline', 72 * HOUR, 10_000],
    ['a millisecond before it', 72 * HOUR + 1, 10_000],
    ['a millisecond after it', 72 * HOUR - 1, 5_000],
    ['at the second deadline', 24 * HOUR, 5_000],
    ['a millisecond after that', 24 * HOUR - 1, 0],
    ['at the start', 0, 0],
    ['once it has begun', -1, 0],
  ])('gives %s (%i ms) %i basis points', (_when, noticeMilliseconds, refundBasisPoints) => {
    expect(refundByPolicy({ tiers: TIERS, noticeMilliseconds }).refundBasisPoints).toBe(
      refundBasisPoints,
    )
    expect(
      refundByPolicy({ tiers: TIERS.toReversed(), noticeMilliseconds }).refundBasisPoints,
    ).toBe(refundBasisPoints)
  })

  it('gives everything until the start where a tier asks no notice, and nothing after', () => {
    const tiers = [{ noticeHours: 0, refundBasisPoints: 10_000 }]
    expect(refundByPolicy({ tiers, noticeMilliseconds: 0 }).refundBasisPoints).toBe(10_000)
    expect(refundByPolicy({ tiers, noticeMilliseconds: -1 })).toEqual({
      refundBasisPoints: 0,
      tier: null,
    })
  })

  it('names the tier that decided', () => {
    expect(refundByPolicy({ tiers: TIERS, noticeMilliseconds: 30 * HOUR }).tier).toBe(TIERS[0])
    expect(refundByPolicy({ tiers: [], noticeMilliseconds: 30 * HOUR }).tier).toBeNull()
  })

  it('takes the kinder of two tiers with one notice', () => {
    const tiers = [
      { noticeHours: 24, refundBasisPoints: 2_500 },
      { noticeHours: 24, refundBasisPoints: 7_500 },
    ]
    expect(refundByPolicy({ tiers, noticeMilliseconds: 24 * HOUR }).refundBasisPoints).toBe(7_500)
  })

  it('refuses a policy that makes no sense', () => {
    for (const tier of [
      { noticeHours: 24, refundBasisPoints: 10_001 },
      { noticeHours: 24, refundBasisPoints: -1 },
      { noticeHours: -1, refundBasisPoints: 1 },
      { noticeHours: NaN, refundBasisPoints: 1 },
    ]) {
      expect(() => refundByPolicy({ tiers: [tier], noticeMilliseconds: 0 })).toThrow(RangeError)
    }
    expect(() => refundByPolicy({ tiers: TIERS, noticeMilliseconds: NaN })).toThrow(RangeError)
  })
})

describe('divideRefund', () => {
  it('gives half of 108.00 with 8.92 of tax in it back, net and tax apart', () => {
    expect(divideRefund({ netMinor: 9_908, taxMinor: 892, refundBasisPoints: 5_000 })).toEqual({
      back: { netMinor: 4_954, taxMinor: 446, grossMinor: 5_400 },
      kept: { netMinor: 4_954, taxMinor: 446, grossMinor: 5_400 },
    })
  })

  it('gives the odd half unit to the golfer', () => {
    const { back, kept } = divideRefund({ netMinor: 1, taxMinor: 0, refundBasisPoints: 5_000 })
    expect([back.grossMinor, kept.grossMinor]).toEqual([1, 0])
  })

  it('leaves nothing over: back and kept are the sale, part by part', () => {
    const part = fc.nat(10_000_000)
    fc.assert(
      fc.property(part, part, fc.nat(10_000), (netMinor, taxMinor, refundBasisPoints) => {
        const { back, kept } = divideRefund({ netMinor, taxMinor, refundBasisPoints })
        expect(back.netMinor + kept.netMinor).toBe(netMinor)
        expect(back.taxMinor + kept.taxMinor).toBe(taxMinor)
        for (const side of [back, kept]) {
          expect(side.netMinor + side.taxMinor).toBe(side.grossMinor)
          expect(Math.min(side.netMinor, side.taxMinor)).toBeGreaterThanOrEqual(0)
        }
        if (refundBasisPoints === 10_000) expect(kept.grossMinor).toBe(0)
        if (refundBasisPoints === 0) expect(back.grossMinor).toBe(0)
      }),
    )
  })

  it('refuses a sale below zero and a share that is none', () => {
    expect(() => divideRefund({ netMinor: -1, taxMinor: 0, refundBasisPoints: 1 })).toThrow()
    expect(() => divideRefund({ netMinor: 1, taxMinor: -1, refundBasisPoints: 1 })).toThrow()
    expect(() => divideRefund({ netMinor: 1, taxMinor: 0, refundBasisPoints: 1.5 })).toThrow()
  })
})
