import type { Refusal } from './state'

/** The card numbers that the provider documents for tests, by what they do. */
export const CARDS = {
  good: '4242424242424242',
  declined: '4000000000000002',
  insufficient: '4000000000009995',
  lost: '4000000000009987',
  stolen: '4000000000009979',
  expired: '4000000000000069',
  wrongCode: '4000000000000127',
  broken: '4000000000000119',
  refundFails: '4000000000005126',
  refundPends: '4000000000007726',
  fraudulent: '4000000000000259',
  notReceived: '4000000000002685',
} as const

const decline = (declineCode: string, sentence = 'Your card was declined.'): Refusal => ({
  code: 'card_declined',
  declineCode,
  sentence,
})
const refuse = (code: string, sentence: string): Refusal => ({ code, declineCode: null, sentence })

const REFUSALS: Readonly<Record<string, Refusal>> = {
  [CARDS.declined]: decline('generic_decline'),
  [CARDS.insufficient]: decline('insufficient_funds', 'Your card has too little money on it.'),
  [CARDS.lost]: decline('lost_card'),
  [CARDS.stolen]: decline('stolen_card'),
  [CARDS.expired]: refuse('expired_card', 'Your card has expired.'),
  [CARDS.wrongCode]: refuse('incorrect_cvc', 'The security code of your card is wrong.'),
  [CARDS.broken]: refuse('processing_error', 'Your card could not be processed. Try again.'),
}

/** Why a card would be refused, or null for one that pays. Numbers not documented are refused. */
export function refusalOf(card: string): Refusal | null {
  const isKnown = Object.values<string>(CARDS).includes(card)
  if (!isKnown) return refuse('incorrect_number', 'This is not one of the test card numbers.')
  return REFUSALS[card] ?? null
}

/** Why the holder of a card disputes what it paid, for the cards that do. */
export const DISPUTES: Readonly<Record<string, string>> = {
  [CARDS.fraudulent]: 'fraudulent',
  [CARDS.notReceived]: 'product_not_received',
}

/** What decides a dispute, written as `uncategorized_text` of its evidence. */
export const EVIDENCE: Readonly<Record<string, 'won' | 'lost'>> = {
  winning_evidence: 'won',
  losing_evidence: 'lost',
}
