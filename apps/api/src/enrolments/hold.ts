import { readAcademy, type Academy } from '../academies/academies'
import { findClinic, listSessionsOf, type Clinic, type Session } from '../clinics/clinics'
import { misfitOf, misfitSentence, type Golfer } from '../golfers/golfers'
import { Problem, notFound } from '../platform/errors'
import { newId } from '../platform/ids'
import { localDayOf } from '../platform/local-day'
import type { Services } from '../platform/services'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import { endWaitingOf, insertEnrolment, takeSeats } from './queries'
import { agreePrice, sessionsAhead, type AgreedPrice } from './rules'

export interface WantedPlaces {
  clinicId: string
  /** Left out for the whole run. */
  sessionId?: string | undefined
}

export interface OnSale {
  academy: Academy
  clinic: Clinic
  kind: 'run' | 'session'
  taken: Session[]
  price: AgreedPrice
}

/** What is for sale at this moment of what is wanted, and for how much. Throws `not-on-sale`. */
export async function findOnSale(
  trx: AcademyTrx,
  wanted: WantedPlaces,
  now: Date,
): Promise<OnSale> {
  const clinic = await findClinic(trx, wanted.clinicId)
  if (!clinic || clinic.state === 'draft') throw notFound('clinic')
  if (clinic.state !== 'published') throw notOnSale('This clinic is no longer on the page.')
  const kind = wanted.sessionId ? 'session' : 'run'
  if (kind === 'run' && clinic.saleMode === 'drop-in') {
    throw notOnSale('This clinic is sold session by session. Please choose a date.')
  }
  if (kind === 'session' && clinic.saleMode === 'run') {
    throw notOnSale('This clinic is sold as a whole run.')
  }
  const academy = await readAcademy(trx)
  const sessions = await listSessionsOf(trx, clinic.id)
  if (wanted.sessionId && !sessions.some(({ id }) => id === wanted.sessionId)) {
    throw notFound('session')
  }
  const ahead = sessionsAhead(sessions, now)
  const taken = wanted.sessionId ? ahead.filter(({ id }) => id === wanted.sessionId) : ahead
  if (taken.length === 0) throw notOnSale('This has begun or was called off.')
  const price = agreePrice({
    wanted: wanted.sessionId
      ? { kind: 'session', sessionId: wanted.sessionId }
      : { kind: 'run', sessions },
    taken,
    runPriceMinor: clinic.runPriceMinor,
    dropInPriceMinor: clinic.dropInPriceMinor,
    isFree: clinic.payMode === 'free',
    tax: { mode: academy.taxMode, basisPoints: academy.taxBasisPoints },
  })
  return { academy, clinic, kind, taken, price }
}

const notOnSale = (sentence: string) => new Problem('not-on-sale', sentence)

/** Throws `golfer-does-not-fit` with the reason in words. */
export function checkFit(golfer: Golfer, { clinic, taken }: OnSale): void {
  const [first] = taken
  const day = first ? localDayOf(first.startsAt, clinic.zone) : ''
  const isAccountHolder = golfer.accountId !== null
  const misfit = misfitOf({ ...golfer, isAccountHolder }, clinic, day)
  if (misfit) {
    throw new Problem('golfer-does-not-fit', misfitSentence(misfit, golfer.name, clinic))
  }
}

/**
 * Takes places for a golfer: the enrolment and its places first, the seats last before commit, all
 * or nothing. What costs nothing is confirmed at once; the rest is held until `heldUntil`.
 * Resolves to the enrolment's id. Throws `session-full` and `already-has-place`.
 */
export async function takePlaces(
  services: Services,
  trx: AcademyTrx,
  given: {
    onSale: OnSale
    golferId: string
    takenBy: string | null
    heldUntil: Date
    isOffer: boolean
  },
): Promise<string> {
  const { onSale, golferId, takenBy, isOffer } = given
  const { clinic, academy, kind, taken, price } = onSale
  const now = services.clock.now()
  if (!isOffer) refuseFull(taken)
  const isFree = price.netMinor + price.taxMinor === 0
  const state = isFree ? 'confirmed' : 'held'
  const id = newId(now)
  const enrolment = {
    id,
    clinicId: clinic.id,
    golferId,
    takenBy,
    kind,
    state,
    isOffer,
    heldUntil: isFree ? null : given.heldUntil,
    currency: academy.currency,
    netMinor: price.netMinor,
    taxMinor: price.taxMinor,
    payMode: isFree ? 'free' : clinic.payMode,
    createdAt: now,
  } as const
  const places = price.places.map((place) => ({ id: newId(now), ...place }))
  await sayDouble(() => insertEnrolment(trx, enrolment, places))
  const [only] = taken
  const waitedFor = kind === 'session' && only ? { sessionId: only.id } : {}
  if (!isOffer) await endWaitingOf(trx, { golferId, clinicId: clinic.id, ...waitedFor })
  if (isFree) {
    const event = { academyId: academy.academyId, enrolmentId: id }
    await services.outbox.emit(trx, 'enrolment.confirmed', event)
  }
  const sessionIds = taken.map((session) => session.id)
  const seats = await takeSeats(trx, { sessionIds, as: state })
  if (seats.length < sessionIds.length) throw sessionFull()
  return id
}

/** A first look that spares the writes where the answer is plain already. */
function refuseFull(taken: readonly Session[]): void {
  if (taken.some(({ held, confirmed, capacity }) => held + confirmed >= capacity)) {
    throw sessionFull()
  }
}

const sessionFull = () =>
  new Problem('session-full', 'The last place has just gone. You can join the waitlist.')

const UNIQUE_VIOLATION = '23505'

async function sayDouble(work: () => Promise<void>): Promise<void> {
  try {
    await work()
  } catch (error) {
    const { code, constraint } = Object(error) as { code?: string; constraint?: string }
    if (code === UNIQUE_VIOLATION && constraint === 'places_one_while_active') {
      throw new Problem('already-has-place', 'This golfer has a place there already.')
    }
    throw error
  }
}
