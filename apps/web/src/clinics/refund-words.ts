import type { ClinicPage } from './queries'

/** "All your money back until 48 hours before, half of it until 24 hours before." */
export function refundInWords({ refundTiers }: Pick<ClinicPage['academy'], 'refundTiers'>): string {
  const parts = refundTiers
    .filter(({ refundBasisPoints }) => refundBasisPoints > 0)
    .map(({ noticeHours, refundBasisPoints }) => {
      const share = shareInWords(refundBasisPoints)
      return noticeHours > 0 ? `${share} until ${noticeHours} hours before` : `${share} at any time`
    })
  const text = parts.join(', ')
  return text ? `${text.slice(0, 1).toUpperCase()}${text.slice(1)}.` : 'Nothing goes back.'
}

function shareInWords(refundBasisPoints: number): string {
  if (refundBasisPoints === 10_000) return 'all your money back'
  return refundBasisPoints === 5_000 ? 'half of it' : `${refundBasisPoints / 100} % of it`
}
