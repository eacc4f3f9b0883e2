import type { Enrolment } from './queries'

type Standing = Pick<
  Enrolment,
  'state' | 'isOffer' | 'endedBecause' | 'payment' | 'owedMinor' | 'totalMinor'
>

const ENDED = {
  lapsed: 'The time ran out',
  'given-up': 'Given up',
  'called-off': 'Called off',
  'let-go': 'Let go',
} as const

/** How a place stands, in a word or two, for the golfer whose it is. */
export function standingOf(place: Standing): string {
  if (place.state === 'cancelled') return ENDED[place.endedBecause ?? 'lapsed']
  if (place.state === 'held') return place.isOffer ? 'Offered to you' : 'Held while you pay'
  return place.owedMinor > 0 ? 'Yours, to be paid at the desk' : 'Yours'
}

/** The same for the desk, which reads of many golfers. */
export function standingAtDesk(place: Standing): string {
  if (place.state === 'cancelled') return ENDED[place.endedBecause ?? 'lapsed']
  if (place.state === 'held') return place.isOffer ? 'Offered' : 'Held for payment'
  if (place.owedMinor > 0) return 'To be paid at the desk'
  return place.payment === 'paid' ? 'Paid' : 'Has the place'
}
