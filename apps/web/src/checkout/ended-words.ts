import type { Enrolment } from '../enrolments/queries'

const SAID = {
  lapsed: 'The time to pay ran out, and the place was let go.',
  'given-up': 'This place was given up.',
  'called-off': 'The sessions of this place were called off.',
  'let-go': 'You let this place go.',
} as const

/** Why a place has ended, and what became of the money of a hold that was not paid in time. */
export function endedInWords(place: Pick<Enrolment, 'endedBecause' | 'payment'>): string {
  const because = place.endedBecause ?? 'lapsed'
  const wasHold = because === 'lapsed' || because === 'let-go'
  if (!wasHold) return SAID[because]
  return place.payment === 'paid'
    ? `${SAID[because]} Your payment came after that; all of it is given back.`
    : `${SAID[because]} Nothing was taken.`
}
