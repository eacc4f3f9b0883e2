import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { CurrencyCode } from './currencies'
import { parseMoney, type MoneyRefusal } from './parse'

describe('parseMoney', () => {
  it.each<[string, CurrencyCode, number]>([
    ['108', 'EUR', 10_800],
    ['108.00', 'EUR', 10_800],
    ['€108.00', 'EUR', 10_800],
    ['108 €', 'EUR', 10_800],
    [' 108 EUR ', 'EUR', 10_800],
    ['eur 108', 'EUR', 10_800],
    ['12,50', 'EUR', 1_250],
    ['12.5', 'EUR', 1_250],
    ['.5', 'EUR', 50],
    ['5.', 'EUR', 500],
    ['1,234', 'EUR', 123_400],
    ['1,234.56', 'EUR', 123_456],
    ['1.234,56', 'EUR', 123_456],
    ['1 234,50', 'EUR', 123_450],
    ['1\u202f234,50', 'EUR', 123_450],
    ['1’234.50', 'EUR', 123_450],
    ['1,234,567', 'EUR', 123_456_700],
    ['1.234.567', 'EUR', 123_456_700],
    ['0', 'EUR', 0],
    ['-0', 'EUR', 0],
    ['007', 'EUR', 700],
    ['１２．５０', 'EUR', 1_250],
    ['$12', 'USD', 1_200],
    ['US$12', 'USD', 1_200],
    ['$12 USD', 'USD', 1_200],
    ['$12', 'CAD', 1_200],
    ['C$12', 'CAD', 1_200],
    ['A$12.00', 'AUD', 1_200],
    ['1200', 'JPY', 1_200],
    ['¥1,200', 'JPY', 1_200],
    ['1.250', 'KWD', 1_250],
    ['1,234.500', 'KWD', 1_234_500],
    ['12,5', 'KWD', 12_500],
  ])('reads %j in %s as %i', (text, currency, amountMinor) => {
    expect(parseMoney(text, currency)).toEqual({ ok: true, amountMinor, currency })
  })

  it.each<[string, CurrencyCode, MoneyRefusal]>([
    ['', 'EUR', 'empty'],
    ['  ', 'EUR', 'empty'],
    ['free', 'EUR', 'not-an-amount'],
    ['€', 'EUR', 'not-an-amount'],
    ['-', 'EUR', 'not-an-amount'],
    ['.', 'EUR', 'not-an-amount'],
    ['1e5', 'EUR', 'not-an-amount'],
    ['0x10', 'EUR', 'not-an-amount'],
    ['12kg', 'EUR', 'not-an-amount'],
    ['1,2,3', 'EUR', 'not-an-amount'],
    ['1,23.45', 'EUR', 'not-an-amount'],
    ['1.234,56.78', 'EUR', 'not-an-amount'],
    ['12..5', 'EUR', 'not-an-amount'],
    ['--1', 'EUR', 'not-an-amount'],
    ['€12kg', 'EUR', 'not-an-amount'],
    ['€12 USD', 'EUR', 'other-currency'],
    ['9'.repeat(61), 'EUR', 'not-an-amount'],
    ['$12', 'EUR', 'other-currency'],
    ['GBP 12', 'EUR', 'other-currency'],
    ['US$12', 'CAD', 'other-currency'],
    ['-18', 'EUR', 'negative'],
    ['(18.00)', 'EUR', 'negative'],
    ['1.234', 'EUR', 'too-precise'],
    ['10.999', 'EUR', 'too-precise'],
    ['1.5', 'JPY', 'too-precise'],
    ['1,234', 'KWD', 'ambiguous'],
    ['9'.repeat(20), 'EUR', 'too-large'],
  ])('refuses %j in %s as %s', (text, currency, reason) => {
    const read = parseMoney(text, currency)
    expect(read).toMatchObject({ ok: false, reason })
    expect(read.ok ? '' : read.sentence).toMatch(/^[A-Z].*\.$/)
  })

  it.each(['-€18.00', '€-18', '−18', '(€18.00)', '−18,00 €'])('takes %j where told', (text) => {
    const read = parseMoney(text, 'EUR', { allowsNegative: true })
    expect(read).toEqual({ ok: true, amountMinor: -1_800, currency: 'EUR' })
  })

  it('holds to the largest amount told, to the unit', () => {
    expect(parseMoney('100.00', 'EUR', { maxMinor: 10_000 }).ok).toBe(true)
    expect(parseMoney('100.01', 'EUR', { maxMinor: 10_000 })).toMatchObject({
      reason: 'too-large',
    })
  })

  it('answers anything that can be typed', () => {
    const text = fc.oneof(
      fc.string({ unit: 'binary' }),
      fc.string({ unit: fc.constantFrom(...'0123456789.,-€$ ()EUR') }),
    )
    fc.assert(
      fc.property(text, fc.constantFrom<CurrencyCode>('EUR', 'JPY', 'KWD'), (typed, currency) => {
        const read = parseMoney(typed, currency)
        if (read.ok)
          expect(Number.isSafeInteger(read.amountMinor) && read.amountMinor >= 0).toBe(true)
      }),
      { numRuns: 500 },
    )
  })
})
