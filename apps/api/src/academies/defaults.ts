import type { RefundTier } from './models'

/** What a new academy starts with, so that a page can be live in minutes; all of it can be changed. */
export interface StartingSettings {
  locale: string
  taxName: string
  taxBasisPoints: number
}

/** Nominal settings by currency; a tax rate is the owner's to confirm. */
const BY_CURRENCY: Record<string, StartingSettings> = {
  EUR: { locale: 'en-IE', taxName: 'VAT', taxBasisPoints: 900 },
  GBP: { locale: 'en-GB', taxName: 'VAT', taxBasisPoints: 2000 },
  USD: { locale: 'en-US', taxName: 'Sales tax', taxBasisPoints: 0 },
  CAD: { locale: 'en-CA', taxName: 'GST', taxBasisPoints: 500 },
  AUD: { locale: 'en-AU', taxName: 'GST', taxBasisPoints: 1000 },
  NZD: { locale: 'en-NZ', taxName: 'GST', taxBasisPoints: 1500 },
  JPY: { locale: 'en-GB', taxName: 'Tax', taxBasisPoints: 1000 },
}

export function startingSettings(currency: string): StartingSettings {
  return BY_CURRENCY[currency] ?? { locale: 'en-GB', taxName: 'Tax', taxBasisPoints: 0 }
}

export const DEFAULT_REFUND_TIERS: RefundTier[] = [
  { noticeHours: 48, refundBasisPoints: 10_000 },
  { noticeHours: 24, refundBasisPoints: 5_000 },
  { noticeHours: 0, refundBasisPoints: 0 },
]

export const DEFAULT_WAIVER =
  'Golf has risks: swung clubs, flying balls, weather and uneven ground. I follow the coach, stand ' +
  'where I am told, stop when the siren sounds or something hurts, and take part at my own risk as ' +
  'far as the law allows.'

export const DEFAULT_SAFEGUARDING =
  'At least two adults are with every junior group. Parents may watch at any time. Photos are ' +
  'taken only where a guardian has said yes. Speak to the owner about any worry, at once.'

export const DEFAULT_ACCENT = { accent: '#26563d', accentDusk: '#9ecba8' }

export const HOLD_MINUTES = 15
export const OFFER_HOURS = 12
export const INVITATION_DAYS = 7
