/**
 * Money in circulation by ISO 4217 code, grouped by the number of figures after the point.
 *
 * The browser carries this table and not the currency-codes package, which weighs forty times as
 * much; a test holds the two equal. Node's own Intl is not asked: it says 0 for HUF, ISO says 2.
 */
const CODES_BY_MINOR_DIGITS = {
  0: ['BIF CLP DJF GNF ISK JPY KMF KRW PYG RWF UGX VND VUV XAF XOF XPF'],
  2: [
    'AED AFN ALL AMD ANG AOA ARS AUD AWG AZN BAM BBD BDT BGN BMD BND BOB BRL BSD BTN BWP BYN',
    'BZD CAD CDF CHF CNY COP CRC CUC CUP CVE CZK DKK DOP DZD EGP ERN ETB EUR FJD FKP GBP GEL',
    'GHS GIP GMD GTQ GYD HKD HNL HTG HUF IDR ILS INR IRR JMD KES KGS KHR KPW KYD KZT LAK LBP',
    'LKR LRD LSL MAD MDL MGA MKD MMK MNT MOP MRU MUR MVR MWK MXN MYR MZN NAD NGN NIO NOK NPR',
    'NZD PAB PEN PGK PHP PKR PLN QAR RON RSD RUB SAR SBD SCR SDG SEK SGD SHP SLE SOS SRD SSP',
    'STN SVC SYP SZL THB TJS TMT TOP TRY TTD TWD TZS UAH USD UYU UZS VED VES WST XCD YER ZAR',
    'ZMW ZWG',
  ],
  3: ['BHD IQD JOD KWD LYD OMR TND'],
} as const

type Words<Text extends string> = Text extends `${infer Head} ${infer Rest}`
  ? Head | Words<Rest>
  : Text

/** The ISO 4217 code of money in circulation, such as `EUR`. */
export type CurrencyCode = Words<
  (typeof CODES_BY_MINOR_DIGITS)[keyof typeof CODES_BY_MINOR_DIGITS][number]
>

const MINOR_DIGITS: ReadonlyMap<string, number> = new Map(
  Object.entries(CODES_BY_MINOR_DIGITS).flatMap(([digits, rows]) =>
    rows.flatMap((row) => row.split(' ').map((code) => [code, Number(digits)] as const)),
  ),
)

/** All codes we know, in the order of the alphabet. */
// The map's keys are made of the same table as the type, which TypeScript cannot follow.
export const CURRENCY_CODES = [...MINOR_DIGITS.keys()].sort() as readonly CurrencyCode[]

/** Whether a text is the code of money we can count in. Small letters are not. */
export function isCurrencyCode(text: string): text is CurrencyCode {
  return MINOR_DIGITS.has(text)
}

/**
 * A text known to be a currency code, for instance one read from our own database.
 * @throws RangeError for any other text.
 */
export function toCurrencyCode(text: string): CurrencyCode {
  if (!isCurrencyCode(text)) throw new RangeError(`${JSON.stringify(text)} is no currency code`)
  return text
}

/** Figures after the point: 2 for EUR, 0 for JPY, 3 for KWD. Source: ISO 4217. */
export function minorDigitsOf(currency: CurrencyCode): number {
  const digits = MINOR_DIGITS.get(currency)
  if (digits === undefined) throw new RangeError(`${currency as string} is no currency code`)
  return digits
}
