import type { RefundTier } from '../academies/academies'

/** The tier that applies, in words: "More than 48 hours before: all your money back." */
export function policySentence(given: {
  tiers: readonly RefundTier[]
  refundBasisPoints: number
}): string {
  const { tiers, refundBasisPoints } = given
  const ordered = [...tiers].sort((a, b) => b.noticeHours - a.noticeHours)
  const at = ordered.findIndex((tier) => tier.refundBasisPoints === refundBasisPoints)
  const tier = ordered[at]
  const before = ordered[at - 1]
  if (!tier) return 'Once a session has begun nothing goes back.'
  const share = shareInWords(tier.refundBasisPoints)
  if (tier.noticeHours > 0) return `${tier.noticeHours} hours or more before: ${share}.`
  return before ? `Less than ${before.noticeHours} hours before: ${share}.` : `Always: ${share}.`
}

function shareInWords(refundBasisPoints: number): string {
  if (refundBasisPoints === 10_000) return 'all your money back'
  if (refundBasisPoints === 0) return 'no money back'
  if (refundBasisPoints === 5_000) return 'half your money back'
  return `${refundBasisPoints / 100} % of your money back`
}

/** "Register closed, 4 present, 1 absent". */
export function registerInWords(marks: readonly (string | null)[]): string {
  const counted = ['present', 'late', 'absent', 'excused']
    .map((mark) => ({ mark, count: marks.filter((given) => given === mark).length }))
    .filter(({ count }) => count > 0)
    .map(({ mark, count }) => `${count} ${mark}`)
  return ['Register closed', ...counted].join(', ')
}
