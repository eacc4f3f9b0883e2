import type { FakeDue, FakeState } from '../state'
import { makeAccounts, type Accounts } from './accounts'
import { makeCharges, type Charges } from './charges'
import { makeCheckouts, type Checkouts } from './checkouts'
import { makeCore, type Told } from './core'
import { isDisputable, makeDisputes, type Disputes } from './disputes'
import { makePayouts, type Payouts } from './payouts'
import { makeRefunds, type Refunds } from './refunds'

export interface Machine extends Accounts, Checkouts, Charges, Refunds, Disputes, Payouts {
  state: FakeState
  now: () => number
  /** Lets everything happen whose time has come. */
  tick: () => void
  advance: (seconds: number) => void
}

/** The provider as a state machine. `tell` is called for everything that a webhook speaks of. */
export function makeMachine(given: {
  state: FakeState
  now: () => Date
  tell: (told: Told) => void
}): Machine {
  const core = makeCore(given)
  const { state, now } = core
  const parts = {
    ...makeAccounts(core),
    ...makeCheckouts(core),
    ...makeCharges(core),
    ...makeRefunds(core),
    ...makeDisputes(core),
    ...makePayouts(core),
  }
  const happen = ({ kind, id }: FakeDue) => {
    const payment = state.payments[id]
    const refund = state.refunds[id]
    const dispute = state.disputes[id]
    // A refund, or a control, may have been quicker.
    if (kind === 'open-dispute' && payment && isDisputable(payment)) parts.openDispute(payment)
    if (kind === 'settle-refund' && refund) parts.settleRefund(refund)
    if (kind === 'decide-dispute' && dispute) parts.decideByEvidence(dispute)
  }
  const tick = () => {
    parts.expireDueCheckouts()
    const due = state.due.filter(({ at }) => at <= now())
    state.due = state.due.filter(({ at }) => at > now())
    due.forEach(happen)
  }
  const advance = (seconds: number) => {
    state.clockOffsetSeconds += seconds
    tick()
  }
  return { ...parts, state, now, tick, advance }
}
