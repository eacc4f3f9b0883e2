import { ProviderError } from './provider-error'

/** The least that a card pays, by currency, in the provider's minor units. */
const LEAST: Readonly<Record<string, number>> = {
  aud: 50,
  cad: 50,
  chf: 50,
  czk: 1_500,
  dkk: 250,
  eur: 50,
  gbp: 30,
  jpy: 50,
  nok: 300,
  nzd: 50,
  pln: 200,
  sek: 300,
  sgd: 50,
  usd: 50,
}
/** Eight digits, in any currency. */
const MOST = 99_999_999

const THREE_DECIMALS = new Set(['bhd', 'jod', 'kwd', 'omr', 'tnd'])

/** The step that amounts of a currency come in: of three decimals the last one is always 0. */
const stepOf = (currency: string): number => (THREE_DECIMALS.has(currency) ? 10 : 1)

/** @throws ProviderError for a currency that is none; they are written in lower case. */
export function requireCurrency(currency: string): void {
  const codes = Intl.supportedValuesOf('currency')
  if (!codes.includes(currency.toUpperCase()) || currency !== currency.toLowerCase()) {
    throw new ProviderError(400, `Invalid currency: ${currency}.`, { param: 'currency' })
  }
}

/** @throws ProviderError for an amount that no card could pay in its currency. */
export function requireChargeable(amount: number, currency: string): void {
  const least = LEAST[currency] ?? 1
  if (amount < least) {
    throw new ProviderError(400, `The least that can be charged is ${least} ${currency}.`, {
      code: 'amount_too_small',
    })
  }
  if (amount > MOST) {
    throw new ProviderError(400, `The most that can be charged is ${MOST} ${currency}.`, {
      code: 'amount_too_large',
    })
  }
  requireStep(amount, currency)
}

/** @throws ProviderError for an amount between two steps of its currency. */
export function requireStep(amount: number, currency: string): void {
  const step = stepOf(currency)
  if (amount % step !== 0) {
    throw new ProviderError(400, `Amounts in ${currency} are whole multiples of ${step}.`, {
      param: 'amount',
    })
  }
}

const FEE_BASIS_POINTS = 150
const FEE_FIXED = 25

/** What the provider keeps of a charge: 1.5 % and 25 minor units, in steps of the currency. */
export function feeOf(amount: number, currency: string): number {
  const step = stepOf(currency)
  const exact = (amount * FEE_BASIS_POINTS) / 10_000 + FEE_FIXED
  return Math.min(amount, Math.round(exact / step) * step)
}
