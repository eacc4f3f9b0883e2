import { toMinor, type Money } from './amounts'
import { minorDigitsOf } from './currencies'

/** What stands where there is no amount at all. Zero that matters is `€0.00`. */
export const NOTHING = '–'

const TRUE_MINUS = '−'

export interface MoneyFormat {
  /** A BCP 47 tag, such as `en-IE`: decides where the sign stands and what parts the thousands. */
  locale: string
  /** Whole units, as on a card: exact halves away from zero. Left out: with its minor units. */
  whole?: boolean
  /** The currency's sign; `false` in a column whose header carries it. Left out: with it. */
  sign?: boolean
}

/**
 * Money in words and figures: €108.00, −€18.00 with a true minus, €0.00; ¥1,200 and KWD 1.250 with
 * the figures ISO 4217 gives them.
 */
export function formatMoney(money: Money, format: MoneyFormat): string {
  const formatter = formatterOf(money, format)
  return formatter
    .formatToParts(toDecimal(money))
    .map(({ type, value }) => (type === 'minusSign' ? TRUE_MINUS : value))
    .join('')
}

/** The en rule that stands for nothing: no sale, no refund, no price. */
export function formatNothing(): string {
  return NOTHING
}

/** The currency's sign as the locale writes it, for the header of a column: €, $, KWD. */
export function currencySign(money: Pick<Money, 'currency'>, format: { locale: string }): string {
  return new Intl.NumberFormat(format.locale, { style: 'currency', currency: money.currency })
    .formatToParts(0)
    .filter(({ type }) => type === 'currency')
    .map(({ value }) => value)
    .join('')
}

/**
 * The amount as a decimal text with all its figures, such as `-18.00`. Text, since a division by
 * a hundred is not exact for large amounts.
 */
export function toDecimal({ amountMinor, currency }: Money): `${number}` {
  const digits = minorDigitsOf(currency)
  const size = String(Math.abs(toMinor(amountMinor))).padStart(digits + 1, '0')
  const whole = size.slice(0, size.length - digits)
  const fraction = digits === 0 ? '' : `.${size.slice(size.length - digits)}`
  // The text is made of figures, one point and perhaps a minus only.
  return `${amountMinor < 0 ? '-' : ''}${whole}${fraction}` as `${number}`
}

/** Formatters are kept: to make one costs some hundred times what it costs to use it. */
const formatters = new Map<string, Intl.NumberFormat>()

function formatterOf(money: Money, { locale, whole = false, sign = true }: MoneyFormat) {
  const key = `${locale} ${money.currency} ${whole} ${sign}`
  const known = formatters.get(key)
  if (known) return known
  const digits = whole ? 0 : minorDigitsOf(money.currency)
  const made = new Intl.NumberFormat(locale, {
    ...(sign ? { style: 'currency', currency: money.currency } : { style: 'decimal' }),
    minimumFractionDigits: digits,
    maximumFractionDigits: digits,
    // A debt of less than half a unit is 0 on a card, not −0.
    signDisplay: 'negative',
  })
  formatters.set(key, made)
  return made
}
