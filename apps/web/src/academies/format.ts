import { formatMoney, formatNothing, minorDigitsOf, toCurrencyCode } from '@marram/money'
import {
  formatDay,
  formatSessionTime,
  formatTime,
  formatTimeRange,
  formatZoneIfElsewhere,
  type DayStyle,
} from '@marram/schedule/format'

export interface Place {
  locale: string
  currency: string
  zone: string
  duskKind: 'sunset' | 'civil'
}

/** The moment that an academy goes by, as it opens a line and as it stands inside one. */
const DUSK = {
  sunset: { word: 'Sunset', inText: 'sunset' },
  civil: { word: 'End of twilight', inText: 'the end of twilight' },
} as const

/** Amounts and times as an academy writes them. */
export function makeFormat({ locale, currency, zone, duskKind }: Place) {
  const code = toCurrencyCode(currency)
  const minorOfOne = 10 ** minorDigitsOf(code)
  return {
    locale,
    currency: code,
    zone,
    duskKind,
    dusk: DUSK[duskKind],
    /** "€108.00" */
    money: (amountMinor: number) => formatMoney({ amountMinor, currency: code }, { locale }),
    /** "€108", for cards and lists; cents only where there are some. */
    shortMoney: (amountMinor: number) =>
      formatMoney(
        { amountMinor, currency: code },
        { locale, whole: amountMinor % minorOfOne === 0 },
      ),
    /** "1,080" in a card whose header carries the currency; nothing is an en rule. */
    cardMoney: (amountMinor: number) =>
      amountMinor === 0
        ? formatNothing()
        : formatMoney({ amountMinor, currency: code }, { locale, whole: true, sign: false }),
    day: (at: string, style?: DayStyle) =>
      formatDay({ at, zone, locale, ...(style ? { style } : {}) }),
    time: (at: string) => formatTime({ at, zone, locale }),
    range: (session: { startsAt: string; endsAt: string }) =>
      formatTimeRange({ ...session, zone, locale }),
    session: (session: { startsAt: string; endsAt: string }) =>
      formatSessionTime({ ...session, zone, locale }),
    /** "Dublin time", for a reader whose own clock shows another time then; else null. */
    zoneIfElsewhere: (at: string) =>
      formatZoneIfElsewhere({
        at,
        zone,
        readerZone: new Intl.DateTimeFormat().resolvedOptions().timeZone,
      }),
  }
}

export type Format = ReturnType<typeof makeFormat>

/** "Ages 7–10", "Handicap 10 and up", "Any level". */
export function levelInWords(clinic: {
  ageMin: number | null
  ageMax: number | null
  handicapMin: number | null
  handicapMax: number | null
}): string {
  const { ageMin, ageMax, handicapMin, handicapMax } = clinic
  const parts = [
    rangeInWords('Ages', ageMin, ageMax),
    rangeInWords('Handicap', handicapMin, handicapMax),
  ].filter(Boolean)
  return parts.length > 0 ? parts.join(', ') : 'Any age and level'
}

function rangeInWords(name: string, from: number | null, to: number | null): string {
  if (from !== null && to !== null) return `${name} ${from}–${to}`
  if (from !== null) return `${name} ${from} and up`
  return to !== null ? `${name} ${to} and under` : ''
}

/** "VAT included", "plus sales tax", or nothing where there is no tax. */
export function taxInWords(academy: {
  taxMode: 'included' | 'added'
  taxName: string
  taxBasisPoints: number
}): string {
  if (academy.taxBasisPoints === 0) return ''
  if (academy.taxMode === 'included') return `${academy.taxName} included`
  return `plus ${academy.taxBasisPoints / 100} % ${academy.taxName.toLowerCase()}`
}
