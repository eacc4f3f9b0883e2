import type { LedgerAccount } from './accounts'

/**
 * One function for each thing that happens to money, after the posting table. All are pure: they
 * take amounts that were allocated at sale and never divide them again.
 */

/** Where a posting belongs in time and in the timetable. */
export interface SessionRef {
  clinicId: string
  sessionId: string
  /** The session's own day, which decides the month it is earned in. */
  heldOn: string
}

export interface PlaceAmount extends SessionRef {
  netMinor: number
  taxMinor: number
}

export interface EntryDraft extends Partial<SessionRef> {
  account: LedgerAccount
  /** Debit is positive, credit negative. */
  amountMinor: number
}

export interface Posting {
  kind: PostingKind
  sourceType: 'order' | 'payment' | 'session' | 'refund' | 'place' | 'enrolment'
  sourceId: string
  revision: number
  what: string
  happenedOn: string
  entries: EntryDraft[]
}

export type PostingKind =
  | 'sale-by-card'
  | 'sale-at-desk'
  | 'payment-at-desk'
  | 'unplaced-payment'
  | 'fees'
  | 'register-closed'
  | 'register-reopened'
  | 'given-up'
  | 'called-off-money'
  | 'called-off-credit'
  | 'unplaced-refund'
  | 'refund-failed'
  | 'session-moved'

interface About {
  sourceId: string
  what: string
  happenedOn: string
}

const debit = (account: LedgerAccount, amountMinor: number, about?: SessionRef): EntryDraft => ({
  account,
  amountMinor,
  ...(about ? pickRef(about) : {}),
})
const credit = (account: LedgerAccount, amountMinor: number, about?: SessionRef): EntryDraft =>
  debit(account, -amountMinor, about)

const pickRef = ({ clinicId, sessionId, heldOn }: SessionRef): SessionRef => ({
  clinicId,
  sessionId,
  heldOn,
})

const grossOf = (places: readonly PlaceAmount[]): number =>
  places.reduce((sum, { netMinor, taxMinor }) => sum + netMinor + taxMinor, 0)

/** Entries of nothing are left out: the database refuses them, and a reader has no use for them. */
function posting(draft: Omit<Posting, 'revision'> & { revision?: number }): Posting {
  const entries = draft.entries.filter(({ amountMinor }) => amountMinor !== 0)
  return { revision: 0, ...draft, entries }
}

const owedFor = (places: readonly PlaceAmount[]): EntryDraft[] =>
  places.flatMap((place) => [
    credit('deferred-clinics', place.netMinor, place),
    credit('tax-owed', place.taxMinor, place),
  ])

const noLongerOwedFor = (places: readonly PlaceAmount[]): EntryDraft[] =>
  owedFor(places).map((entry) => ({ ...entry, amountMinor: -entry.amountMinor }))

/** Sale by card: the provider has the money, the academy owes the sessions and the tax. */
export function saleByCard(sale: About & { places: readonly PlaceAmount[] }): Posting {
  const entries = [debit('provider-clearing', grossOf(sale.places)), ...owedFor(sale.places)]
  return posting({ ...pickAbout(sale), kind: 'sale-by-card', sourceType: 'order', entries })
}

/** Pay at the desk: nothing is in yet, so the golfer owes it. */
export function saleAtDesk(sale: About & { places: readonly PlaceAmount[] }): Posting {
  const entries = [debit('receivable', grossOf(sale.places)), ...owedFor(sale.places)]
  return posting({ ...pickAbout(sale), kind: 'sale-at-desk', sourceType: 'order', entries })
}

/** What a golfer owed comes in at the desk. */
export function paymentAtDesk(
  payment: About & { amountMinor: number; into: 'cash-drawer' | 'bank' },
): Posting {
  const { amountMinor, into } = payment
  const entries = [debit(into, amountMinor), credit('receivable', amountMinor)]
  return posting({ ...pickAbout(payment), kind: 'payment-at-desk', sourceType: 'payment', entries })
}

/** A payment that came when its place had gone: owed back until it is returned. */
export function unplacedPayment(payment: About & { amountMinor: number }): Posting {
  const { amountMinor } = payment
  const entries = [debit('provider-clearing', amountMinor), credit('refunds-due', amountMinor)]
  return posting({
    ...pickAbout(payment),
    kind: 'unplaced-payment',
    sourceType: 'payment',
    entries,
  })
}

export function unplacedRefund(refund: About & { amountMinor: number }): Posting {
  const { amountMinor } = refund
  const entries = [debit('refunds-due', amountMinor), credit('provider-clearing', amountMinor)]
  return posting({ ...pickAbout(refund), kind: 'unplaced-refund', sourceType: 'refund', entries })
}

/** What the provider and the platform keep of a payment. */
export function fees(
  payment: About & { providerFeeMinor: number; platformFeeMinor: number },
): Posting {
  const { providerFeeMinor, platformFeeMinor } = payment
  const entries = [
    debit('provider-fees', providerFeeMinor),
    debit('platform-fees', platformFeeMinor),
    credit('provider-clearing', providerFeeMinor + platformFeeMinor),
  ]
  return posting({ ...pickAbout(payment), kind: 'fees', sourceType: 'payment', entries })
}

/** A register is closed: what was owed for its places is earned, net of tax. */
export function registerClosed(
  closing: About & { revision: number; places: readonly PlaceAmount[] },
): Posting {
  const entries = closing.places.flatMap((place) => [
    debit('deferred-clinics', place.netMinor, place),
    credit('earned-clinics', place.netMinor, place),
  ])
  const { revision } = closing
  return posting({
    ...pickAbout(closing),
    kind: 'register-closed',
    sourceType: 'session',
    revision,
    entries,
  })
}

/** A register is opened again: the reverse of that revision, to the last unit. */
export function registerReopened(
  closed: Pick<Posting, 'sourceId' | 'revision' | 'entries'> & Omit<About, 'sourceId'>,
): Posting {
  const { sourceId, revision, what, happenedOn } = closed
  const entries = closed.entries.map((entry) => ({ ...entry, amountMinor: -entry.amountMinor }))
  const about = { sourceId, revision, what, happenedOn }
  return posting({ ...about, kind: 'register-reopened', sourceType: 'session', entries })
}

/** A place given up: for each, what goes back and what the policy keeps. */
export interface GivenUpPlace extends SessionRef {
  back: { netMinor: number; taxMinor: number }
  kept: { netMinor: number; taxMinor: number }
}

/**
 * Given up before earning. What was still to be paid at the desk is owed no longer, and the rest goes
 * back from where it came; what is kept is earned as a late cancellation, and its tax stays owed.
 */
export function givenUp(
  given: About & {
    places: readonly GivenUpPlace[]
    from: 'provider-clearing' | 'cash-drawer' | 'bank' | 'receivable'
    noLongerOwedMinor: number
  },
): Posting {
  const entries = given.places.flatMap((place) => [
    debit('deferred-clinics', place.back.netMinor, place),
    debit('tax-owed', place.back.taxMinor, place),
    debit('deferred-clinics', place.kept.netMinor, place),
    credit('earned-late-cancellations', place.kept.netMinor, place),
  ])
  const backMinor = given.places.reduce((sum, { back }) => sum + back.netMinor + back.taxMinor, 0)
  entries.push(
    credit('receivable', given.noLongerOwedMinor),
    credit(given.from, backMinor - given.noLongerOwedMinor),
  )
  return posting({ ...pickAbout(given), kind: 'given-up', sourceType: 'enrolment', entries })
}

/**
 * Called off, and the golfer has the money back. Where a part of it was never paid, that part is
 * owed no longer at once (revision 0), and the rest goes back when it is chosen (revision 1).
 */
export function calledOffMoney(
  off: About & {
    revision: 0 | 1
    place: PlaceAmount
    from: 'provider-clearing' | 'cash-drawer' | 'bank' | 'receivable'
  },
): Posting {
  const entries = [...noLongerOwedFor([off.place]), credit(off.from, grossOf([off.place]))]
  const { revision } = off
  return posting({
    ...pickAbout(off),
    kind: 'called-off-money',
    sourceType: 'place',
    revision,
    entries,
  })
}

/** Called off, and the academy owes the golfer credit instead. */
export function calledOffCredit(off: About & { place: PlaceAmount }): Posting {
  const entries = [...noLongerOwedFor([off.place]), credit('credits-owed', grossOf([off.place]))]
  return posting({ ...pickAbout(off), kind: 'called-off-credit', sourceType: 'place', entries })
}

/** The provider could not carry a refund out: the money is there again, and still due. */
export function refundFailed(refund: About & { amountMinor: number }): Posting {
  const { amountMinor } = refund
  const entries = [debit('provider-clearing', amountMinor), credit('refunds-due', amountMinor)]
  return posting({ ...pickAbout(refund), kind: 'refund-failed', sourceType: 'refund', entries })
}

/** A session moved to another day takes what is still to be earned along. */
export function sessionMoved(
  moved: About & { revision: number; places: readonly PlaceAmount[]; heldOn: string },
): Posting {
  const { revision, heldOn } = moved
  const entries = moved.places.flatMap((place) => [
    debit('deferred-clinics', place.netMinor, place),
    credit('deferred-clinics', place.netMinor, { ...place, heldOn }),
  ])
  return posting({
    ...pickAbout(moved),
    kind: 'session-moved',
    sourceType: 'session',
    revision,
    entries,
  })
}

const pickAbout = ({ sourceId, what, happenedOn }: About): About => ({ sourceId, what, happenedOn })
