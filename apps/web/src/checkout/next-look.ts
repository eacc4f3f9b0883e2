import type { Enrolment } from '../enrolments/queries'

const WORD_COMES_MS = 1_000
/** After its end a hold is let go by a job that comes by every few seconds. */
const SWEEP_MS = 3_000

/**
 * In how many milliseconds a place is to be asked for anew. The provider's word takes a moment to
 * arrive after paying; and a hold ends at its time, whether or not anybody presses anything.
 */
export function nextLookMs(
  place: Pick<Enrolment, 'state' | 'payment' | 'heldUntil'> | undefined,
  { isBack, nowMs }: { isBack: boolean; nowMs: number },
): number | false {
  if (place?.state !== 'held') return false
  if (isBack || place.payment !== 'none') return WORD_COMES_MS
  if (place.heldUntil === null) return false
  return Math.max(Date.parse(place.heldUntil) - nowMs, SWEEP_MS)
}
