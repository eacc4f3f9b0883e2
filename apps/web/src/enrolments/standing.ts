import type { Enrolment } from './queries'

/** How a place stands, in a word or two. */
export function standingOf(enrolment: Enrolment): string {
  if (enrolment.state === 'held') return enrolment.isOffer ? 'Offered to you' : 'Held while you pay'
  if (enrolment.state === 'cancelled') {
    return {
      lapsed: 'The time ran out',
      'given-up': 'Given up',
      'called-off': 'Called off',
      'let-go': 'Let go',
    }[enrolment.endedBecause ?? 'lapsed']
  }
  return enrolment.payment === 'at-desk' ? 'Yours, to be paid at the desk' : 'Yours'
}
