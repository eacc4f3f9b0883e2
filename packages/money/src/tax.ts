import { toMinor } from './amounts'
import { divideHalfUp } from './rounding'

/** An amount with its tax told apart: net and tax add up to gross, all in minor units. */
export interface TaxedAmount {
  netMinor: number
  taxMinor: number
  grossMinor: number
}

const WHOLE_BASIS_POINTS = 10_000n

/**
 * The tax inside a price that includes it: gross × rate / (1 + rate), half-up.
 * 10.00 at 20 % → tax 1.67, net 8.33. Hundredths of a per cent: 20 % is 2000.
 * @throws RangeError for a negative or fractional rate, or an unsafe amount.
 */
export function taxIncluded(price: { amountMinor: number; rateBasisPoints: number }): TaxedAmount {
  const grossMinor = toMinor(price.amountMinor)
  const rate = toRate(price.rateBasisPoints)
  const taxMinor = toMinor(divideHalfUp(BigInt(grossMinor) * rate, WHOLE_BASIS_POINTS + rate))
  return { netMinor: toMinor(grossMinor - taxMinor), taxMinor, grossMinor }
}

/**
 * The tax on top of a price without it: net × rate, half-up. 10.99 at 6.25 % → tax 0.69.
 * @throws RangeError for a negative or fractional rate, or an unsafe amount.
 */
export function taxAdded(price: { amountMinor: number; rateBasisPoints: number }): TaxedAmount {
  const netMinor = toMinor(price.amountMinor)
  const rate = toRate(price.rateBasisPoints)
  const taxMinor = toMinor(divideHalfUp(BigInt(netMinor) * rate, WHOLE_BASIS_POINTS))
  return { netMinor, taxMinor, grossMinor: toMinor(netMinor + taxMinor) }
}

function toRate(rateBasisPoints: number): bigint {
  if (!Number.isSafeInteger(rateBasisPoints) || rateBasisPoints < 0) {
    throw new RangeError(`${rateBasisPoints} is not a tax rate in basis points`)
  }
  return BigInt(rateBasisPoints)
}
