import { data } from 'currency-codes'
import { describe, expect, it } from 'vitest'
import { CURRENCY_CODES, isCurrencyCode, minorDigitsOf, toCurrencyCode } from './currencies'

/**
 * Codes of ISO 4217 that nobody pays with: funds, metals, units of account, tests and "none".
 * Everything else in the list must be in our table.
 */
const NOT_IN_CIRCULATION = [
  'BOV CHE CHW CLF COU MXV USN UYI UYW',
  'XAG XAU XPD XPT XBA XBB XBC XBD XDR XSU XUA XTS XXX',
].flatMap((row) => row.split(' '))

describe('currencies', () => {
  it('has every currency in circulation with its minor units (currency-codes, ISO 4217)', () => {
    const expected = data
      .filter(({ code }) => !NOT_IN_CIRCULATION.includes(code))
      .map(({ code, digits }) => [code, digits])
    const ours = CURRENCY_CODES.map((code) => [code, minorDigitsOf(code)])
    expect(Object.fromEntries(ours)).toEqual(Object.fromEntries(expected))
    expect(ours.length).toBe(expected.length)
    expect(ours.length).toBeGreaterThan(150)
  })

  // ISO 4217 through currency-codes.
  it.each([
    ['USD', 2],
    ['JPY', 0],
    ['KRW', 0],
    ['KWD', 3],
    ['BHD', 3],
    ['HUF', 2],
  ] as const)('counts %s to %i figures', (code, digits) => {
    expect(minorDigitsOf(code)).toBe(digits)
  })

  it('tells codes from other texts', () => {
    expect(isCurrencyCode('EUR')).toBe(true)
    for (const text of ['eur', '', 'XXX', 'EU', 'toString', 'EUR ']) {
      expect(isCurrencyCode(text)).toBe(false)
      expect(() => toCurrencyCode(text)).toThrow(RangeError)
    }
    expect(toCurrencyCode('KWD')).toBe('KWD')
  })
})
