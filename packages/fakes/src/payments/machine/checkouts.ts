import { requireChargeable } from '../currencies'
import { ProviderError } from '../provider-error'
import type { FakeCheckout } from '../state'
import type { Core } from './core'

const HALF_HOUR_SECONDS = 30 * 60
const DAY_SECONDS = 24 * 3600
/** Forgiven at both ends, for the way here. */
const GRACE_SECONDS = 60

export type WantedCheckout = Omit<
  FakeCheckout,
  'id' | 'status' | 'paymentStatus' | 'created' | 'payment'
>

export interface Checkouts {
  createCheckout: (wanted: WantedCheckout) => FakeCheckout
  expireCheckout: (checkout: FakeCheckout) => FakeCheckout
  /** Ends the checkouts whose time has come. */
  expireDueCheckouts: () => void
}

export function makeCheckouts({ state, now, newId, tell }: Core): Checkouts {
  const expire = (checkout: FakeCheckout) => {
    checkout.status = 'expired'
    const { account, id: objectId } = checkout
    tell({ type: 'checkout.session.expired', account, objectId })
  }
  return {
    createCheckout(wanted) {
      if (!state.accounts[wanted.account]?.chargesEnabled) {
        throw new ProviderError(400, 'This account cannot take charges yet.')
      }
      requireChargeable(wanted.amount, wanted.currency)
      const lifetime = wanted.expiresAt - now()
      const isShort = lifetime < HALF_HOUR_SECONDS - GRACE_SECONDS
      if (isShort || lifetime > DAY_SECONDS + GRACE_SECONDS) {
        throw new ProviderError(400, 'expires_at must be 30 minutes to 24 hours from now.', {
          param: 'expires_at',
        })
      }
      const checkout: FakeCheckout = {
        id: newId('cs_test'),
        status: 'open',
        paymentStatus: 'unpaid',
        created: now(),
        payment: null,
        ...wanted,
      }
      state.checkouts[checkout.id] = checkout
      return checkout
    },
    expireCheckout(checkout) {
      if (checkout.status !== 'open') {
        throw new ProviderError(
          400,
          `Only open checkout sessions can be expired; this one is ${checkout.status}.`,
        )
      }
      expire(checkout)
      return checkout
    },
    expireDueCheckouts() {
      for (const checkout of Object.values(state.checkouts)) {
        if (checkout.status === 'open' && checkout.expiresAt <= now()) expire(checkout)
      }
    },
  }
}
