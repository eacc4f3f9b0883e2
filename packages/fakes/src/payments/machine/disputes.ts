import { DISPUTES, EVIDENCE } from '../cards'
import { ProviderError } from '../provider-error'
import type { FakeDispute, FakePayment } from '../state'
import type { Core } from './core'

/** What a dispute costs, in minor units of its currency; given back where it is won. */
const DISPUTE_FEE = 1_500
const DAYS_TO_ANSWER = 9

export interface Disputes {
  openDispute: (payment: FakePayment, reason?: string) => FakeDispute
  /** Answers a dispute. Kept as a draft, or sent to the bank, which decides a little later. */
  addEvidence: (
    dispute: FakeDispute,
    given: { evidence: Record<string, string>; isSubmitted: boolean },
  ) => FakeDispute
  decideDispute: (dispute: FakeDispute, outcome: 'won' | 'lost') => FakeDispute
  /** What the bank makes of the evidence, where it says so. */
  decideByEvidence: (dispute: FakeDispute) => void
}

export function makeDisputes(core: Core): Disputes {
  const { state, newId, now, tell } = core
  const say = ({ account, id: objectId }: FakeDispute, what: string) =>
    tell({ type: `charge.dispute.${what}`, account, objectId })

  const decideDispute: Disputes['decideDispute'] = (dispute, outcome) => {
    requireOpen(dispute)
    dispute.status = outcome
    if (outcome === 'won') {
      dispute.balanceTransactions.push(bookDispute(core, dispute))
      say(dispute, 'funds_reinstated')
    }
    say(dispute, 'closed')
    return dispute
  }
  return {
    openDispute(payment, reason = DISPUTES[payment.card] ?? 'general') {
      if (!isDisputable(payment)) {
        throw new ProviderError(400, 'There is nothing in this payment to dispute.')
      }
      const dispute: FakeDispute = {
        id: newId('du'),
        account: payment.account,
        payment: payment.id,
        amount: payment.amount - payment.refunded,
        currency: payment.currency,
        reason,
        status: 'needs_response',
        evidence: {},
        submissions: 0,
        balanceTransactions: [],
        metadata: {},
        dueBy: now() + DAYS_TO_ANSWER * 24 * 3600,
        created: now(),
      }
      state.disputes[dispute.id] = dispute
      payment.isDisputed = true
      dispute.balanceTransactions.push(bookDispute(core, dispute))
      say(dispute, 'created')
      say(dispute, 'funds_withdrawn')
      return dispute
    },
    addEvidence(dispute, { evidence, isSubmitted }) {
      requireOpen(dispute)
      Object.assign(dispute.evidence, evidence)
      if (isSubmitted) {
        dispute.status = 'under_review'
        dispute.submissions += 1
        core.later('decide-dispute', dispute.id)
      }
      say(dispute, 'updated')
      return dispute
    },
    decideDispute,
    decideByEvidence(dispute) {
      const outcome = EVIDENCE[dispute.evidence['uncategorized_text'] ?? '']
      if (outcome && isOpen(dispute)) decideDispute(dispute, outcome)
    },
  }
}

const isOpen = ({ status }: FakeDispute) => status === 'needs_response' || status === 'under_review'

function requireOpen(dispute: FakeDispute): void {
  if (!isOpen(dispute)) throw new ProviderError(400, 'This dispute is already closed.')
}

/** Whether there is money in a payment that its holder has not asked back yet. */
export const isDisputable = ({ status, amount, refunded, isDisputed }: FakePayment): boolean =>
  status === 'succeeded' && refunded < amount && !isDisputed

/** Takes the money and the fee as long as the dispute lasts, and gives both back to who wins it. */
function bookDispute(core: Core, { id, account, amount, currency, status }: FakeDispute): string {
  const isWon = status === 'won'
  return core.book({
    account,
    amount: isWon ? amount : -amount,
    currency,
    type: 'adjustment',
    category: isWon ? 'dispute_reversal' : 'dispute',
    source: id,
    description: isWon ? 'Dispute won' : 'Dispute',
    providerFee: isWon ? -DISPUTE_FEE : DISPUTE_FEE,
  })
}
