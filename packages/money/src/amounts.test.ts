import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { add, moneyOf, negate, subtract, sum, toMinor } from './amounts'

const amountMinor = fc.integer({ min: -1_000_000_000, max: 1_000_000_000 })

describe('amounts', () => {
  it('adds, subtracts and negates within one currency', () => {
    expect(add(moneyOf(10_800, 'EUR'), moneyOf(-1_800, 'EUR'))).toEqual(moneyOf(9_000, 'EUR'))
    expect(subtract(moneyOf(10_800, 'EUR'), moneyOf(1_800, 'EUR')).amountMinor).toBe(9_000)
    expect(negate(moneyOf(1_800, 'EUR')).amountMinor).toBe(-1_800)
    expect(sum([], 'KWD')).toEqual({ amountMinor: 0, currency: 'KWD' })
  })

  it('refuses to mix currencies', () => {
    expect(() => add(moneyOf(1, 'EUR'), moneyOf(1, 'USD'))).toThrow(RangeError)
    expect(() => subtract(moneyOf(1, 'EUR'), moneyOf(1, 'USD'))).toThrow(RangeError)
    expect(() => sum([moneyOf(1, 'EUR')], 'USD')).toThrow(RangeError)
  })

  it('holds whole, exact amounts only', () => {
    for (const wrong of [0.5, NaN, Infinity, Number.MAX_SAFE_INTEGER + 1]) {
      expect(() => moneyOf(wrong, 'EUR')).toThrow(RangeError)
    }
    expect(() => toMinor(2n ** 53n)).toThrow(RangeError)
    expect(() => add(moneyOf(Number.MAX_SAFE_INTEGER, 'EUR'), moneyOf(1, 'EUR'))).toThrow()
  })

  it('has one zero', () => {
    expect(Object.is(negate(moneyOf(0, 'EUR')).amountMinor, 0)).toBe(true)
    expect(Object.is(moneyOf(-0, 'EUR').amountMinor, 0)).toBe(true)
  })

  it('adds to the same sum in any order, and subtracts what it added', () => {
    fc.assert(
      fc.property(fc.array(amountMinor), amountMinor, (amounts, extra) => {
        const all = amounts.map((amount) => moneyOf(amount, 'EUR'))
        expect(sum(all.toReversed(), 'EUR')).toEqual(sum(all, 'EUR'))
        const one = moneyOf(extra, 'EUR')
        expect(subtract(add(sum(all, 'EUR'), one), one)).toEqual(sum(all, 'EUR'))
      }),
    )
  })
})
