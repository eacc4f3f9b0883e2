import type { FakeBalanceTransaction, FakeDue, FakeState } from '../state'

/** What a webhook speaks of: a type, the account it happened to, and the object as an id. */
export interface Told {
  type: string
  /** Null for what happens to the platform itself. */
  account: string | null
  objectId: string
}

type Booked = 'account' | 'amount' | 'currency' | 'type' | 'category' | 'source' | 'description'
export type Movement = Pick<FakeBalanceTransaction, Booked> &
  Partial<Pick<FakeBalanceTransaction, 'providerFee' | 'applicationFee' | 'payout' | 'created'>>

/** What every part of the machine works with. */
export interface Core {
  state: FakeState
  /** Unix seconds of the provider's clock. */
  now: () => number
  newId: (prefix: string) => string
  tell: (told: Told) => void
  /** Moves a balance, and gives the id of the record. */
  book: (movement: Movement) => string
  /** Lets something happen by itself, a little later. */
  later: (kind: FakeDue['kind'], id: string) => void
}

/** How long the provider takes over what it does not do at once. */
export const LATER_SECONDS = 2
/** How long money waits before a payout may take it. */
const AVAILABLE_AFTER_SECONDS = 2 * 24 * 3600

export function makeCore(given: {
  state: FakeState
  now: () => Date
  tell: (told: Told) => void
}): Core {
  const { state, tell } = given
  const now = () => Math.floor(given.now().getTime() / 1000) + state.clockOffsetSeconds
  const newId = (prefix: string) => {
    state.next += 1
    return `${prefix}_fake${state.next.toString(36).padStart(10, '0')}`
  }
  return {
    state,
    now,
    newId,
    tell,
    book(movement) {
      const id = newId('txn')
      const created = movement.created ?? now()
      // What goes out goes at once; what comes in waits.
      const wait = movement.amount > 0 ? AVAILABLE_AFTER_SECONDS : 0
      state.balance[id] = {
        providerFee: 0,
        applicationFee: 0,
        payout: null,
        ...movement,
        id,
        created,
        availableOn: created + wait,
      }
      return id
    },
    later: (kind, id) => void state.due.push({ at: now() + LATER_SECONDS, kind, id }),
  }
}
