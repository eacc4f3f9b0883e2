import { allocateByLargestRemainder, priceOfRemaining, taxAdded, taxIncluded } from '@marram/money'

export interface PricedSession {
  id: string
  number: number
  startsAt: Date
  state: 'planned' | 'called-off'
}

export interface PriceOfPlace {
  sessionId: string
  netMinor: number
  taxMinor: number
}

export interface AgreedPrice {
  netMinor: number
  taxMinor: number
  places: PriceOfPlace[]
}

/** The sessions that somebody who joins now can still take, in order of number. */
export function sessionsAhead<S extends PricedSession>(sessions: readonly S[], now: Date): S[] {
  return sessions
    .filter(({ state, startsAt }) => state === 'planned' && startsAt.getTime() > now.getTime())
    .sort((a, b) => a.number - b.number)
}

/**
 * Agrees a price for places, net and tax apart, and allocates it to each session once. A run is
 * split over all its sessions and a late joiner pays the shares of those that remain; the tax is
 * worked out on what is paid, and then laid on the sessions by largest remainder, so that what each
 * is worth is its share exactly.
 */
export function agreePrice(given: {
  wanted: { kind: 'run'; sessionCount: number } | { kind: 'session' }
  taken: readonly { id: string; number: number }[]
  runPriceMinor: number | null
  dropInPriceMinor: number | null
  isFree: boolean
  tax: { mode: 'included' | 'added'; basisPoints: number }
}): AgreedPrice {
  const { taken, tax } = given
  const shares = given.isFree ? taken.map(() => 0) : sharesOf(given)
  const amountMinor = shares.reduce((sum, share) => sum + share, 0)
  const rate = { amountMinor, rateBasisPoints: tax.basisPoints }
  const { netMinor, taxMinor } = tax.mode === 'included' ? taxIncluded(rate) : taxAdded(rate)
  const weights = shares.some((share) => share > 0) ? shares : taken.map(() => 1)
  const nets = allocateByLargestRemainder(netMinor, weights)
  // A price that includes its tax is the share itself, to the cent: the tax is the rest of it.
  const taxes =
    tax.mode === 'included'
      ? shares.map((share, index) => share - (nets[index] ?? 0))
      : allocateByLargestRemainder(taxMinor, weights)
  return {
    netMinor,
    taxMinor,
    places: taken.map(({ id }, index) => ({
      sessionId: id,
      netMinor: nets[index] ?? 0,
      taxMinor: taxes[index] ?? 0,
    })),
  }
}

function sharesOf(given: Parameters<typeof agreePrice>[0]): number[] {
  const { wanted, taken, runPriceMinor, dropInPriceMinor } = given
  if (wanted.kind === 'session') return taken.map(() => dropInPriceMinor ?? 0)
  const remainingNumbers = taken.map(({ number }) => number)
  const { sessionCount } = wanted
  const run = { runPriceMinor: runPriceMinor ?? 0, sessionCount, remainingNumbers }
  return priceOfRemaining(run).sharesMinor
}

/** Says whether a session has no seat left, held ones counted. */
export function isFull(session: { held: number; confirmed: number; capacity: number }): boolean {
  return session.held + session.confirmed >= session.capacity
}

/** A hold is over once its last millisecond has passed. */
export function isLapsed(heldUntil: Date, now: Date): boolean {
  return now.getTime() > heldUntil.getTime()
}

/** Until when an offer stands: some hours, but never past the start of what is offered. */
export function offerUntil(given: { now: Date; offerHours: number; firstStartsAt: Date }): Date {
  const byClock = given.now.getTime() + given.offerHours * 3_600_000
  return new Date(Math.min(byClock, given.firstStartsAt.getTime()))
}
