import { ProviderError } from '../provider-error'
import type { FakeBalanceTransaction, FakePayout } from '../state'
import type { Core } from './core'

const DAY_SECONDS = 24 * 3600

export interface Payouts {
  /**
   * Sends what an account has earned, and was not sent before, to its bank: everything of one
   * currency up to a time, whether the provider would call it available yet or not.
   */
  makePayout: (wanted: { account: string; currency: string; until?: number }) => FakePayout
  settlePayout: (payout: FakePayout, outcome: 'paid' | 'failed') => FakePayout
}

export function makePayouts(core: Core): Payouts {
  const { state, newId, now, tell } = core
  const say = ({ account, id: objectId }: FakePayout, what: string) =>
    tell({ type: `payout.${what}`, account, objectId })
  return {
    makePayout({ account, currency, until = now() }) {
      const taken = Object.values(state.balance).filter(
        (moved) =>
          moved.account === account &&
          moved.currency === currency &&
          moved.payout === null &&
          moved.created <= until,
      )
      const amount = taken.reduce((sum, moved) => sum + netOf(moved), 0)
      if (amount <= 0) throw new ProviderError(400, 'There is nothing to pay out.')
      const id = newId('po')
      for (const moved of taken) moved.payout = id
      const payout: FakePayout = {
        id,
        account,
        amount,
        currency,
        status: 'in_transit',
        balanceTransaction: bookPayout(core, { id, account, amount: -amount, currency }),
        failureBalanceTransaction: null,
        arrivesOn: Math.ceil(now() / DAY_SECONDS) * DAY_SECONDS,
        created: now(),
      }
      state.payouts[id] = payout
      say(payout, 'created')
      return payout
    },
    settlePayout(payout, outcome) {
      if (payout.status !== 'in_transit') {
        throw new ProviderError(400, `This payout is ${payout.status} already.`)
      }
      payout.status = outcome
      if (outcome === 'failed') {
        payout.failureBalanceTransaction = bookPayout(core, payout)
        say(payout, 'failed')
        return payout
      }
      say(payout, 'paid')
      say(payout, 'reconciliation_completed')
      return payout
    },
  }
}

export const netOf = ({ amount, providerFee, applicationFee }: FakeBalanceTransaction): number =>
  amount - providerFee - applicationFee

/** Money leaving for the bank, or coming back from one that did not take it. */
function bookPayout(
  core: Core,
  { id, account, amount, currency }: Pick<FakePayout, 'id' | 'account' | 'amount' | 'currency'>,
): string {
  const isLeaving = amount < 0
  return core.book({
    account,
    amount,
    currency,
    type: isLeaving ? 'payout' : 'payout_failure',
    category: isLeaving ? 'payout' : 'payout_reversal',
    source: id,
    description: isLeaving ? 'Payout' : 'Payout that failed',
    // A payout lists its own record among what it took; what came back waits for the next one.
    ...(isLeaving ? { payout: id } : {}),
  })
}
