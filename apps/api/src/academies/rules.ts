import type { RefundTier } from './models'

/** First words of our own addresses, which no academy may take. */
const RESERVED = new Set([
  'api',
  'assets',
  'auth',
  'calendar',
  'demo',
  'desk',
  'fonts',
  'healthz',
  'help',
  'invitation',
  'metrics',
  'my',
  'open',
  'readyz',
  'reset',
  'robots',
  'sign-in',
  'sign-up',
  'sitemap',
  'ui',
  'verify',
  'webhooks',
])

export const isReservedSlug = (slug: string): boolean => RESERVED.has(slug)

/** A name as an address: "Kittiwake Links" becomes "kittiwake-links". May be empty. */
export function toSlug(text: string): string {
  return text
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .replaceAll('Ł', 'L')
    .replaceAll('ł', 'l')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60)
    .replace(/-+$/, '')
}

/** Most notice first; with an end at no notice at all, so that every moment has a tier. */
export function sortTiers(tiers: readonly RefundTier[]): RefundTier[] {
  const sorted = [...tiers].sort((a, b) => b.noticeHours - a.noticeHours)
  const hasEnd = sorted.some((tier) => tier.noticeHours === 0)
  return hasEnd ? sorted : [...sorted, { noticeHours: 0, refundBasisPoints: 0 }]
}
