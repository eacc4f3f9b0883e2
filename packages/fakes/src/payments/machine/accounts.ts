import { missing } from '../provider-error'
import type { FakeAccount } from '../state'
import type { Core } from './core'

export interface Accounts {
  createAccount: (wanted: Pick<FakeAccount, 'email' | 'name' | 'metadata'>) => FakeAccount
  /** What the owner does on the provider's own pages: from here on the account takes charges. */
  finishOnboarding: (id: string) => void
}

export function makeAccounts({ state, now, newId, tell }: Core): Accounts {
  return {
    createAccount(wanted) {
      const account = { id: newId('acct'), chargesEnabled: false, created: now(), ...wanted }
      state.accounts[account.id] = account
      return account
    },
    finishOnboarding(id) {
      const account = state.accounts[id]
      if (!account) throw missing('account', id)
      account.chargesEnabled = true
      tell({ type: 'account.updated', account: id, objectId: id })
    },
  }
}
