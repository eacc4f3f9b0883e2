import { allocateByLargestRemainder } from './allocation'
import { toMinor } from './amounts'
import { divideHalfUp } from './rounding'
import type { TaxedAmount } from './tax'

/** Who gives up a place at least `noticeHours` before it starts gets this share of it back. */
export interface RefundTier {
  noticeHours: number
  refundBasisPoints: number
}

const HOUR_MILLISECONDS = 3_600_000

/**
 * The share of the price an academy's policy gives back, in basis points (10,000 is all of it).
 *
 * The longest notice that was still kept decides. Notice given exactly at a deadline is in time; a
 * millisecond later it is not. Once the session has begun, and below every tier, nothing is due.
 * The order of the tiers does not matter; of two with one notice the one kinder to the golfer
 * counts.
 *
 * @param given.noticeMilliseconds from giving the place up to the start; negative once begun.
 * @throws RangeError for a share outside 0 to 10,000, or notice that is no number.
 */
export function refundByPolicy(given: {
  tiers: readonly RefundTier[]
  noticeMilliseconds: number
}): { refundBasisPoints: number; tier: RefundTier | null } {
  const { tiers, noticeMilliseconds } = given
  if (Number.isNaN(noticeMilliseconds)) throw new RangeError('Notice must be a number')
  tiers.forEach(requireTier)
  if (noticeMilliseconds < 0) return { refundBasisPoints: 0, tier: null }
  const [tier] = tiers
    .filter(({ noticeHours }) => noticeMilliseconds >= noticeHours * HOUR_MILLISECONDS)
    .sort((a, b) => b.noticeHours - a.noticeHours || b.refundBasisPoints - a.refundBasisPoints)
  return { refundBasisPoints: tier?.refundBasisPoints ?? 0, tier: tier ?? null }
}

/**
 * What goes back of a sold amount, and what is kept, net and tax apart: the gross is divided
 * half-up in the golfer's favour of the odd half, then laid on net and tax by largest remainder.
 * Back and kept together are the sale, part by part, so that nothing is left owed.
 *
 * @throws RangeError for a share outside 0 to 10,000, or parts that do not add up or are negative.
 */
export function divideRefund(sale: {
  netMinor: number
  taxMinor: number
  refundBasisPoints: number
}): { back: TaxedAmount; kept: TaxedAmount } {
  const netMinor = toMinor(sale.netMinor)
  const taxMinor = toMinor(sale.taxMinor)
  if (netMinor < 0 || taxMinor < 0) throw new RangeError('A sale has no negative part')
  requireShare(sale.refundBasisPoints)
  const gross = BigInt(netMinor) + BigInt(taxMinor)
  const backMinor = toMinor(divideHalfUp(gross * BigInt(sale.refundBasisPoints), 10_000n))
  const [backNetMinor = 0, backTaxMinor = 0] =
    gross === 0n ? [] : allocateByLargestRemainder(backMinor, [netMinor, taxMinor])
  return {
    back: { netMinor: backNetMinor, taxMinor: backTaxMinor, grossMinor: backMinor },
    kept: {
      netMinor: netMinor - backNetMinor,
      taxMinor: taxMinor - backTaxMinor,
      grossMinor: toMinor(gross - BigInt(backMinor)),
    },
  }
}

function requireTier({ noticeHours, refundBasisPoints }: RefundTier): void {
  if (!Number.isFinite(noticeHours) || noticeHours < 0) {
    throw new RangeError(`${noticeHours} hours is no notice`)
  }
  requireShare(refundBasisPoints)
}

function requireShare(refundBasisPoints: number): void {
  if (!Number.isInteger(refundBasisPoints) || refundBasisPoints < 0 || refundBasisPoints > 10_000) {
    throw new RangeError(`${refundBasisPoints} basis points is no share`)
  }
}
