import type { Parsed } from '@marram/contract'
import { joinAsGolfer } from '../academies/academies'
import { listSessionsOf } from '../clinics/clinics'
import {
  addDependant,
  checkOwnGolfer,
  ensureOwnGolfer,
  findGolfer,
  findOwnGolfer,
  recordConsent,
  type Person,
} from '../golfers/golfers'
import { Problem, notFound } from '../platform/errors'
import type { Services } from '../platform/services'
import { together } from '../platform/tenancy/together'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { refuseFull, takePlaces } from './hold'
import type { EndedBecause, Enrolment, Place } from './models'
import { checkFit, checkOpen, findOnSale } from './on-sale'
import { readStanding, type GolferToPlace } from './on-sale-queries'
import {
  confirmSeats,
  findActiveEnrolment,
  findEnrolment,
  listPlaces,
  lockEnrolment,
  lockSeatsOf,
  returnSeats,
  setPlacesState,
  settleOffer,
  takeSeats,
  updateEnrolment,
} from './queries'
import { sessionsAhead } from './rules'
import { offerFreedPlaces } from './waitlist'

interface Wish {
  academyId: string
  person: Person
  wanted: Parsed<'enrolments.hold', 'body'>
}

/** Shows an enrolment inside the transaction that made it. */
type Show<View> = (trx: AcademyTrx, enrolmentId: string) => Promise<View>

/**
 * Holds places for the person, somebody they look after, or a new dependant, while payment is made.
 * Pressing twice gives the same hold. Resolves to the enrolment, shown.
 */
export async function holdPlaces<View>(
  services: Services,
  wish: Wish,
  show: Show<View>,
): Promise<View> {
  try {
    const view = await inAcademy(services.db, wish.academyId, (trx) =>
      tryHold(services, trx, { ...wish, show }),
    )
    services.metrics.holds.inc({ outcome: 'held' })
    return view
  } catch (error) {
    services.metrics.holds.inc({ outcome: error instanceof Problem ? error.code : 'unexpected' })
    throw error
  }
}

async function tryHold<View>(
  services: Services,
  trx: AcademyTrx,
  { person, wanted, show }: Wish & { show: Show<View> },
): Promise<View> {
  const { for: whom, clinicId } = wanted
  const now = services.clock.now()
  const golferId = whom.kind === 'golfer' ? whom.golferId : null
  const [onSale, standing] = await together(
    findOnSale(trx, wanted, now),
    readStanding(trx, { accountId: person.id, golferId, clinicId }),
  )
  checkOpen(onSale)
  if (!standing.isMember) await joinAsGolfer(trx, { accountId: person.id, now })
  const known = whom.kind === 'new' ? null : standing.golfer
  const golfer = await golferFor(services, trx, { person, whom, known })
  checkFit(golfer, onSale)
  const sessionIds = onSale.taken.map(({ id }) => id)
  const had = known
    ? standing.active.find((active) => active.sessionIds.some((id) => sessionIds.includes(id)))
    : await findActiveEnrolment(trx, { golferId: golfer.id, sessionIds })
  if (had?.state === 'held' && had.takenBy === person.id && had.kind === onSale.kind) {
    return show(trx, had.id)
  }
  if (had) throw new Problem('already-has-place', `${golfer.name} has a place there already.`)
  refuseFull(onSale)
  const { waiver, holdMinutes } = onSale.academy
  const consent = { golferId: golfer.id, kind: 'waiver', wording: waiver } as const
  return takePlaces(services, trx, {
    onSale,
    golferId: golfer.id,
    takenBy: person.id,
    heldUntil: new Date(now.getTime() + holdMinutes * 60_000),
    isOffer: false,
    meanwhile: async (id) => {
      const given = recordConsent(trx, { ...consent, givenBy: person.id, now })
      const [, view] = await together(given, show(trx, id))
      return view
    },
  })
}

async function golferFor(
  services: Services,
  trx: AcademyTrx,
  given: {
    person: Person
    whom: Parsed<'enrolments.hold', 'body'>['for']
    known: GolferToPlace | null
  },
): Promise<GolferToPlace> {
  const { person, whom, known } = given
  switch (whom.kind) {
    case 'me': {
      const { handicap } = whom
      const isNews = handicap !== undefined && handicap !== known?.handicap
      if (known && !isNews) return known
      return ensureOwnGolfer(services, trx, { person, ...(isNews ? { handicap } : {}) })
    }
    case 'golfer':
      return checkOwnGolfer(known, person.id)
    case 'new':
      return addDependant(services, trx, { guardianId: person.id, dependant: whom.dependant })
  }
}

/** A place given by staff, to be paid at the desk: held long enough to be paid in person. */
export async function givePlaces(
  services: Services,
  given: { academyId: string; wanted: Parsed<'enrolments.give', 'body'> },
  alsoDo: (trx: AcademyTrx, enrolmentId: string) => Promise<void>,
): Promise<string> {
  const { wanted } = given
  return inAcademy(services.db, given.academyId, async (trx) => {
    const now = services.clock.now()
    const onSale = await findOnSale(trx, wanted, now)
    const golfer = await findGolfer(trx, wanted.golferId)
    if (!golfer) throw notFound('golfer')
    if (!wanted.isException) checkFit(golfer, onSale)
    refuseFull(onSale)
    const id = await takePlaces(services, trx, {
      onSale,
      golferId: golfer.id,
      takenBy: golfer.accountId ?? golfer.guardianAccountId,
      heldUntil: new Date(now.getTime() + onSale.academy.holdMinutes * 60_000),
      isOffer: false,
      meanwhile: (id) => Promise.resolve(id),
    })
    await alsoDo(trx, id)
    return id
  })
}

/** Locks an enrolment that the person may act for: their own golfer's or a dependant's. */
export async function lockOwnEnrolment(
  trx: AcademyTrx,
  { enrolmentId, accountId }: { enrolmentId: string; accountId: string },
): Promise<Enrolment> {
  return checkOwn(trx, { enrolment: await lockEnrolment(trx, enrolmentId), accountId })
}

/** As `lockOwnEnrolment`, for who only looks. */
export async function findOwnEnrolment(
  trx: AcademyTrx,
  { enrolmentId, accountId }: { enrolmentId: string; accountId: string },
): Promise<Enrolment> {
  return checkOwn(trx, { enrolment: await findEnrolment(trx, enrolmentId), accountId })
}

async function checkOwn(
  trx: AcademyTrx,
  { enrolment, accountId }: { enrolment: Enrolment | undefined; accountId: string },
): Promise<Enrolment> {
  if (!enrolment) throw notFound('place')
  await findOwnGolfer(trx, { golferId: enrolment.golferId, accountId })
  return enrolment
}

/** Turns a hold into confirmed places. A second call finds them confirmed and changes nothing. */
export async function confirmHold(
  services: Services,
  trx: AcademyTrx,
  { academyId, enrolmentId }: { academyId: string; enrolmentId: string },
): Promise<'confirmed' | 'already-confirmed' | 'gone'> {
  const enrolment = await lockEnrolment(trx, enrolmentId)
  if (!enrolment) throw notFound('place')
  if (enrolment.state === 'confirmed') return 'already-confirmed'
  if (enrolment.state === 'cancelled') return 'gone'
  const held = (await listPlaces(trx, enrolmentId)).filter(({ state }) => state === 'held')
  await updateEnrolment(trx, enrolmentId, { state: 'confirmed', heldUntil: null })
  await setPlacesState(trx, idsOf(held), { state: 'confirmed' })
  await confirmSeats(
    trx,
    held.map(({ sessionId }) => sessionId),
  )
  await settleOffer(trx, { enrolmentId, state: 'taken' })
  await services.outbox.emit(trx, 'enrolment.confirmed', { academyId, enrolmentId })
  return 'confirmed'
}

/**
 * Takes the places of a hold that has ended again, for a payment that came late. All of them or none:
 * resolves to false when any is gone or has begun, or when they were confirmed and then given up or
 * called off.
 */
export async function retakeLapsed(
  services: Services,
  trx: AcademyTrx,
  { academyId, enrolmentId }: { academyId: string; enrolmentId: string },
): Promise<boolean> {
  const enrolment = await lockEnrolment(trx, enrolmentId)
  const wasHold = enrolment?.endedBecause === 'lapsed' || enrolment?.endedBecause === 'let-go'
  if (!wasHold) return false
  const places = await listPlaces(trx, enrolmentId)
  const sessionIds = places.map(({ sessionId }) => sessionId)
  const sessions = await listSessionsOf(trx, enrolment.clinicId)
  const ahead = new Set(sessionsAhead(sessions, services.clock.now()).map(({ id }) => id))
  if (!sessionIds.every((id) => ahead.has(id))) return false
  if (await findActiveEnrolment(trx, { golferId: enrolment.golferId, sessionIds })) return false
  const seats = await takeSeats(trx, { sessionIds, as: 'confirmed' })
  if (seats.length < sessionIds.length) {
    await returnSeats(trx, { sessionIds: seats, from: 'confirmed' })
    return false
  }
  const revived = { state: 'confirmed', endedBecause: null, endedAt: null } as const
  await updateEnrolment(trx, enrolmentId, revived)
  await setPlacesState(trx, idsOf(places), { state: 'confirmed' })
  await services.outbox.emit(trx, 'enrolment.confirmed', { academyId, enrolmentId })
  return true
}

/** Lets a hold go, and offers its places to those who wait. False when it was no hold any more. */
export async function releaseHold(
  services: Services,
  trx: AcademyTrx,
  given: { academyId: string; enrolmentId: string; because: 'lapsed' | 'let-go' },
): Promise<boolean> {
  const { academyId, enrolmentId, because } = given
  const enrolment = await lockEnrolment(trx, enrolmentId)
  if (enrolment?.state !== 'held') return false
  await lockSeatsOf(trx, enrolment.clinicId)
  const held = (await listPlaces(trx, enrolmentId)).filter(({ state }) => state === 'held')
  await end(services, trx, { enrolment, places: held, because, from: 'held' })
  await settleOffer(trx, { enrolmentId, state: 'passed' })
  await offerFreedPlaces(services, trx, { academyId, clinicId: enrolment.clinicId })
  return true
}

/** Gives confirmed places up: all that are still ahead, so that the enrolment ends with them. */
export async function giveUpPlaces(
  services: Services,
  trx: AcademyTrx,
  given: { academyId: string; enrolment: Enrolment; places: readonly Place[] },
): Promise<void> {
  const { academyId, enrolment, places } = given
  await lockSeatsOf(trx, enrolment.clinicId)
  await end(services, trx, { enrolment, places, because: 'given-up', from: 'confirmed' })
  await offerFreedPlaces(services, trx, { academyId, clinicId: enrolment.clinicId })
}

async function end(
  services: Services,
  trx: AcademyTrx,
  given: {
    enrolment: Enrolment
    places: readonly Place[]
    because: EndedBecause
    from: 'held' | 'confirmed'
  },
): Promise<void> {
  const { enrolment, places, because, from } = given
  await updateEnrolment(trx, enrolment.id, {
    state: 'cancelled',
    endedBecause: because,
    heldUntil: null,
    endedAt: services.clock.now(),
  })
  await setPlacesState(trx, idsOf(places), { state: 'cancelled', endedBecause: because })
  await returnSeats(trx, { sessionIds: places.map(({ sessionId }) => sessionId), from })
}

/** Ends places whose session was called off. The enrolment ends with its last place. */
export async function endCalledOffPlaces(
  services: Services,
  trx: AcademyTrx,
  { enrolment, places }: { enrolment: Enrolment; places: readonly Place[] },
): Promise<void> {
  await setPlacesState(trx, idsOf(places), { state: 'cancelled', endedBecause: 'called-off' })
  await returnSeats(trx, {
    sessionIds: places.map(({ sessionId }) => sessionId),
    from: 'confirmed',
  })
  const left = await listPlaces(trx, enrolment.id)
  if (left.every(({ state }) => state === 'cancelled')) {
    const ended = { state: 'cancelled', endedBecause: 'called-off' } as const
    await updateEnrolment(trx, enrolment.id, { ...ended, endedAt: services.clock.now() })
  }
}

const idsOf = (places: readonly Place[]): string[] => places.map(({ id }) => id)

export {
  findEnrolment,
  findPlace,
  hasPlaceIn,
  listEnrolments,
  listEnrolmentsIn,
  listPlaceRows,
  listPlaces,
  listWaitlist,
  lockConfirmedPlaces,
  lockEnrolment,
  lockSeatsOf,
  type EnrolmentRow,
  type PlaceRow,
} from './queries'
export { isLapsed } from './rules'
export type { Enrolment, Place } from './models'
