import type { Answer, Parsed } from '@marram/contract'
import { joinAsGolfer } from '../academies/academies'
import { listSessionsOf } from '../clinics/clinics'
import { ensureOwnGolfer, findOwnGolfer, type Golfer, type Person } from '../golfers/golfers'
import { Problem, notFound } from '../platform/errors'
import { newId } from '../platform/ids'
import { invariant } from '../platform/invariant'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { takePlaces } from './hold'
import type { WaitlistEntry } from './models'
import { checkFit, checkOpen, findOnSale, type OnSale, type WantedPlaces } from './on-sale'
import {
  endWaiting,
  findActiveEnrolment,
  findWaitlistEntry,
  insertWaitlistEntry,
  listWaitlist,
  lockQueue,
  lockSeatsOf,
  updateWaitlistEntry,
  type WaitlistRow,
} from './queries'
import { isFull, offerUntil, sessionsAhead } from './rules'

type WaitlistView = Answer<'waitlist.join'>

/** Joins the waitlist of a full run or session. Joining twice keeps the first place in it. */
export async function joinWaitlist(
  services: Services,
  given: { academyId: string; person: Person; wanted: Parsed<'waitlist.join', 'body'> },
): Promise<WaitlistView> {
  const { person, wanted } = given
  const accountId = person.id
  return inAcademy(services.db, given.academyId, async (trx) => {
    const now = services.clock.now()
    const { clinicId, sessionId = null } = wanted
    const golfer = await whoWaits(services, trx, { person, wanted })
    const golferId = golfer.id
    const onSale = await findOnSale(trx, wanted, now)
    checkOpen(onSale)
    checkFit(golfer, onSale)
    const sessionIds = onSale.taken.map(({ id }) => id)
    if (await findActiveEnrolment(trx, { golferId, sessionIds })) {
      throw new Problem('already-has-place', 'This golfer has a place there already.')
    }
    if (!onSale.taken.some(isFull)) {
      throw new Problem('not-on-sale', 'There is a place: take it instead of waiting.')
    }
    const entry = { clinicId, sessionId, golferId, accountId, joinedAt: now }
    await insertWaitlistEntry(trx, { id: newId(now), ...entry, state: 'waiting' })
    const waits = await listWaitlist(trx, { golferId })
    const row = waits.find((row) => row.clinicId === clinicId && row.sessionId === sessionId)
    invariant(row, 'the golfer waits by now')
    return viewEntry(row)
  })
}

/** Somebody who is new here waits as well as anybody: they become a golfer by it. */
async function whoWaits(
  services: Services,
  trx: AcademyTrx,
  { person, wanted }: { person: Person; wanted: Parsed<'waitlist.join', 'body'> },
): Promise<Golfer> {
  const { golferId, handicap } = wanted
  if (golferId) return findOwnGolfer(trx, { golferId, accountId: person.id })
  await joinAsGolfer(trx, { accountId: person.id, now: services.clock.now() })
  return ensureOwnGolfer(services, trx, { person, ...(handicap === undefined ? {} : { handicap }) })
}

/** Leaves the waitlist. Who has left already, or had the offer taken, has nothing left to leave. */
export async function leaveWaitlist(
  { db }: Services,
  { academyId, accountId, entryId }: { academyId: string; accountId: string; entryId: string },
): Promise<void> {
  await inAcademy(db, academyId, async (trx) => {
    const entry = await findWaitlistEntry(trx, entryId)
    if (entry?.accountId !== accountId) throw notFound('waitlist entry')
    if (await endWaiting(trx, entryId)) return
    const now = await findWaitlistEntry(trx, entryId)
    if (now?.state === 'offered') {
      throw new Problem('already-decided', 'You have been offered the place: let it go there.')
    }
  })
}

/**
 * Offers freed places to those who wait, in the transaction that freed them, so that nobody can
 * snipe them in between; that transaction has locked the clinic's seats. Somebody who waits for a whole run is offered it only when every session
 * still to come has a place.
 */
export async function offerFreedPlaces(
  services: Services,
  trx: AcademyTrx,
  { academyId, clinicId }: { academyId: string; clinicId: string },
): Promise<void> {
  const queue = await lockQueue(trx, clinicId)
  if (queue.length === 0) return
  const now = services.clock.now()
  const free = new Map(
    sessionsAhead(await listSessionsOf(trx, clinicId), now).map((session) => [
      session.id,
      session.capacity - session.held - session.confirmed,
    ]),
  )
  for (const entry of queue) {
    const needed = entry.sessionId ? [entry.sessionId] : [...free.keys()]
    const hasAll = needed.length > 0 && needed.every((id) => (free.get(id) ?? 0) > 0)
    if (!hasAll) continue
    if (!(await offer(services, trx, { academyId, entry, needed, now }))) continue
    for (const id of needed) free.set(id, (free.get(id) ?? 0) - 1)
  }
}

/** More places were opened, or the clinic is on the page again: who waits comes first. */
export async function offerOpenedPlaces(
  services: Services,
  { academyId, clinicId }: { academyId: string; clinicId: string },
): Promise<void> {
  await inAcademy(services.db, academyId, async (trx) => {
    await lockSeatsOf(trx, clinicId)
    await offerFreedPlaces(services, trx, { academyId, clinicId })
  })
}

async function offer(
  services: Services,
  trx: AcademyTrx,
  given: { academyId: string; entry: WaitlistEntry; needed: readonly string[]; now: Date },
): Promise<boolean> {
  const { academyId, entry, needed, now } = given
  const { golferId, clinicId, sessionId, accountId } = entry
  // Somebody who got in another way has no more use for the offer.
  if (await findActiveEnrolment(trx, { golferId, sessionIds: needed })) {
    await updateWaitlistEntry(trx, entry.id, { state: 'left' })
    return false
  }
  const onSale = await findIfOnSale(trx, { clinicId, sessionId: sessionId ?? undefined }, now)
  if (!onSale) return false
  const [first] = onSale.taken
  invariant(first, 'what is on sale has a first session')
  const { offerHours } = onSale.academy
  const enrolmentId = await takePlaces(services, trx, {
    onSale,
    golferId,
    takenBy: accountId,
    heldUntil: offerUntil({ now, offerHours, firstStartsAt: first.startsAt }),
    isOffer: true,
    meanwhile: (id) => Promise.resolve(id),
  })
  const isFree = onSale.price.netMinor + onSale.price.taxMinor === 0
  await updateWaitlistEntry(trx, entry.id, { state: isFree ? 'taken' : 'offered', enrolmentId })
  if (!isFree) await services.outbox.emit(trx, 'enrolment.offered', { academyId, enrolmentId })
  return true
}

/**
 * Nothing is offered of a clinic that was taken off the page, or is sold another way by now; whoever
 * gives a place up there must be able to all the same.
 */
async function findIfOnSale(
  trx: AcademyTrx,
  wanted: WantedPlaces,
  now: Date,
): Promise<OnSale | null> {
  try {
    return await findOnSale(trx, wanted, now)
  } catch (error) {
    if (error instanceof Problem && error.code === 'not-on-sale') return null
    throw error
  }
}

export function viewEntry(row: WaitlistRow): WaitlistView {
  return {
    id: row.id,
    clinic: { slug: row.clinicSlug, title: row.clinicTitle },
    sessionStartsAt: row.sessionStartsAt?.toISOString() ?? null,
    golferName: row.golferName,
    position: row.position,
    state: row.state === 'offered' ? 'offered' : 'waiting',
    enrolmentId: row.enrolmentId,
    offeredUntil: row.offeredUntil?.toISOString() ?? null,
  }
}
