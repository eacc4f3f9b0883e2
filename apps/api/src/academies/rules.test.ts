import fc from 'fast-check'
import { isSlug } from '@marram/contract'
import { describe, expect, it } from 'vitest'
import { isReservedSlug, sortTiers, toSlug } from './rules'

describe('a name as an address', () => {
  it.each([
    { name: 'Kittiwake Links', slug: 'kittiwake-links' },
    { name: '  Sligeach & Área Ñ  ', slug: 'sligeach-area-n' },
    { name: 'Łódź', slug: 'lodz' },
    { name: '高尔夫', slug: '' },
    { name: `${'a'.repeat(59)} b`, slug: 'a'.repeat(59) },
  ])('$name', ({ name, slug }) => {
    expect(toSlug(name)).toBe(slug)
  })

  it('is one, or empty, whatever the name, and stays as it is', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme', maxLength: 90 }), (name) => {
        const slug = toSlug(name)
        expect(slug.length < 2 || isSlug(slug), slug).toBe(true)
        expect(toSlug(slug)).toBe(slug)
      }),
    )
  })

  it('may be one of ours', () => {
    expect(isReservedSlug('desk')).toBe(true)
    expect(isReservedSlug('desk-2')).toBe(false)
  })
})

describe('refund tiers', () => {
  const tier = fc.record({ noticeHours: fc.nat(400), refundBasisPoints: fc.nat(10_000) })

  it('have most notice first and an end at none, and lose nothing', () => {
    fc.assert(
      fc.property(fc.array(tier, { maxLength: 6 }), (tiers) => {
        const sorted = sortTiers(tiers)
        const hours = sorted.map(({ noticeHours }) => noticeHours)
        expect(hours).toEqual(hours.toSorted((a, b) => b - a))
        expect(hours.at(-1)).toBe(0)
        expect(sorted).toEqual(expect.arrayContaining(tiers))
        expect(sortTiers(sorted)).toEqual(sorted)
      }),
    )
  })

  it('give nothing back after the last of them', () => {
    const full = { noticeHours: 48, refundBasisPoints: 10_000 }
    expect(sortTiers([full])).toEqual([full, { noticeHours: 0, refundBasisPoints: 0 }])
  })
})
