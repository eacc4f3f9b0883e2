import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { moneyOf } from './amounts'
import type { CurrencyCode } from './currencies'
import { currencySign, formatMoney, formatNothing, toDecimal } from './format'
import { parseMoney } from './parse'

describe('formatMoney', () => {
  it.each<[number, CurrencyCode, string, string]>([
    [10_800, 'EUR', 'en-IE', '€108.00'],
    [14_500, 'USD', 'en-US', '$145.00'],
    [-1_800, 'EUR', 'en-IE', '−€18.00'],
    [0, 'EUR', 'en-IE', '€0.00'],
    [-0, 'EUR', 'en-IE', '€0.00'],
    [4_896_600, 'EUR', 'en-IE', '€48,966.00'],
    [1_200, 'JPY', 'en-US', '¥1,200'],
    [1_250, 'KWD', 'en-US', 'KWD 1.250'],
    [120_000, 'HUF', 'en-US', 'HUF 1,200.00'],
    [14_500, 'USD', 'en-IE', 'US$145.00'],
    [Number.MAX_SAFE_INTEGER, 'EUR', 'en-IE', '€90,071,992,547,409.91'],
    [-5, 'EUR', 'en-IE', '−€0.05'],
  ])('writes %i minor units of %s in %s as %s', (amount, currency, locale, text) => {
    const written = formatMoney({ amountMinor: amount, currency }, { locale })
    expect(written.replaceAll('\u00a0', ' ')).toBe(text)
  })

  it('writes whole units without a sign for a card, halves away from zero', () => {
    const onCard = (amount: number) =>
      formatMoney(moneyOf(amount, 'EUR'), { locale: 'en-IE', whole: true, sign: false })
    expect(onCard(842_000)).toBe('8,420')
    expect(onCard(-1_850)).toBe('−19')
    expect(onCard(1_850)).toBe('19')
    expect(onCard(-49)).toBe('0')
  })

  it('keeps the minor units where only the sign is left out', () => {
    const format = { locale: 'en-IE', sign: false }
    expect(formatMoney(moneyOf(-1_800, 'EUR'), format)).toBe('−18.00')
  })

  it('has a sign for headers and a rule for nothing', () => {
    expect(currencySign({ currency: 'EUR' }, { locale: 'en-IE' })).toBe('€')
    expect(formatNothing()).toBe('–')
  })

  it('refuses a fraction of a minor unit', () => {
    const half = { amountMinor: 0.5, currency: 'EUR' } as const
    expect(() => formatMoney(half, { locale: 'en-IE' })).toThrow(RangeError)
  })

  it('is read back as it was, in every number of figures', () => {
    const currency = fc.constantFrom<CurrencyCode>('EUR', 'USD', 'JPY', 'KWD')
    fc.assert(
      fc.property(fc.maxSafeInteger(), currency, (amount, code) => {
        const text = formatMoney(moneyOf(amount, code), { locale: 'en-US' })
        const read = parseMoney(text, code, { allowsNegative: true })
        expect(read).toEqual({ ok: true, amountMinor: amount + 0, currency: code })
        const decimal = parseMoney(toDecimal(moneyOf(amount, code)), code, { allowsNegative: true })
        expect(decimal).toEqual(read)
      }),
    )
  })
})
