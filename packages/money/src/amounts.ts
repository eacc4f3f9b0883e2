import type { CurrencyCode } from './currencies'

/** An amount in the smallest unit of its currency; `amountMinor` is a safe integer, of any sign. */
export interface Money {
  amountMinor: number
  currency: CurrencyCode
}

/**
 * Holds a number to be a whole, exact count of minor units; -0 becomes 0.
 * @throws RangeError for fractions, NaN, infinities and what a double cannot hold exactly.
 */
export function toMinor(value: number | bigint): number {
  const amountMinor = Number(value)
  if (!Number.isSafeInteger(amountMinor)) {
    throw new RangeError(`${String(value)} is not a whole amount of minor units`)
  }
  return amountMinor + 0
}

/** Makes money of an amount. @throws RangeError when the amount is not a safe integer. */
export function moneyOf(amountMinor: number, currency: CurrencyCode): Money {
  return { amountMinor: toMinor(amountMinor), currency }
}

/** The sum of two amounts. @throws RangeError for two currencies, or a sum that is not exact. */
export function add(left: Money, right: Money): Money {
  requireOneCurrency(left, right)
  return moneyOf(left.amountMinor + right.amountMinor, left.currency)
}

/** `left` less `right`. @throws RangeError for two currencies, or a result that is not exact. */
export function subtract(left: Money, right: Money): Money {
  return add(left, negate(right))
}

/** The same amount, owed the other way. */
export function negate(money: Money): Money {
  return moneyOf(0 - money.amountMinor, money.currency)
}

/** The sum of any number of amounts; of none it is zero of the currency given. */
export function sum(amounts: readonly Money[], currency: CurrencyCode): Money {
  return amounts.reduce(add, moneyOf(0, currency))
}

function requireOneCurrency(left: Money, right: Money): void {
  if (left.currency !== right.currency) {
    throw new RangeError(`${left.currency} and ${right.currency} cannot be added`)
  }
}
