import type { Answer, Parsed } from '@marram/contract'
import { toInstant, toLocal } from '@marram/schedule'
import { readAcademy } from '../academies/academies'
import { findCoachOf } from '../coaches/coaches'
import { Problem, notFound } from '../platform/errors'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { findVenue, listAreas, listVenues, type Venue } from '../venues/venues'
import { sayClashes } from './clashes'
import { duskOver } from './light'
import type { Session } from './models'
import { checkAreas, checkCoaches } from './plan'
import {
  findClinic,
  findSession,
  isCoachOfSession,
  listSessionParts,
  listSessionsBetween,
  lockSession,
  releaseSessionParts,
  setSessionParts,
  updateSession,
} from './queries'
import { isSameMeeting } from './rules'
import { viewSessions, type SessionView } from './views'

/** Whose sessions a member of staff may touch. */
export interface SessionReach {
  academyId: string
  accountId: string
  scope: 'all' | 'own'
}

/** Locks a session that the person may touch; anybody else's is refused. */
export async function lockReachableSession(
  trx: AcademyTrx,
  { reach, sessionId }: { reach: SessionReach; sessionId: string },
): Promise<Session> {
  return checkReach(trx, { reach, session: await lockSession(trx, sessionId) })
}

/** As `lockReachableSession`, for who only looks. */
export async function findReachableSession(
  trx: AcademyTrx,
  { reach, sessionId }: { reach: SessionReach; sessionId: string },
): Promise<Session> {
  return checkReach(trx, { reach, session: await findSession(trx, sessionId) })
}

async function checkReach(
  trx: AcademyTrx,
  { reach, session }: { reach: SessionReach; session: Session | undefined },
): Promise<Session> {
  if (!session) throw notFound('session')
  const { scope, accountId } = reach
  const { id: sessionId } = session
  if (scope === 'own' && !(await isCoachOfSession(trx, { sessionId, accountId }))) {
    throw new Problem('not-allowed', 'This is another coach’s session.')
  }
  return session
}

/** Changes one session of a run: its time, coaches, areas or capacity. */
export async function changeSession(
  services: Services,
  wanted: { reach: SessionReach; sessionId: string; change: Parsed<'sessions.change', 'body'> },
): Promise<SessionView> {
  const { reach, sessionId, change } = wanted
  return inAcademy(services.db, reach.academyId, (trx) =>
    sayClashes(async () => {
      const session = await lockReachableSession(trx, { reach, sessionId })
      refuseEnded(session)
      const clinic = await findClinic(trx, session.clinicId)
      const venue = clinic && (await findVenue(trx, clinic.venueId))
      if (!clinic || !venue) throw notFound('clinic')
      const times = newTimes(session, change, clinic.zone)
      refuseThePast({ session, times, now: services.clock.now() })
      const parts = (await listSessionParts(trx, [sessionId])).get(sessionId)
      const had = {
        ...session,
        coachIds: (parts?.coaches ?? []).map(({ id }) => id),
        areas: (parts?.areas ?? []).map(({ id, ...units }) => ({ areaId: id, ...units })),
      }
      const { coachIds = had.coachIds, areas = had.areas } = change
      await checkAreas(trx, { venueId: venue.id, areas })
      await checkCoaches(trx, coachIds)
      const capacity = checkCapacity(session, change.capacity)
      const { duskKind } = await readAcademy(trx)
      const isNews = !isSameMeeting(had, { ...times, coachIds, areas })
      await updateSession(trx, sessionId, {
        ...times,
        capacity,
        duskAt: duskOver(venue, { dayLocal: times.heldOn, duskKind }),
        calendarSequence: session.calendarSequence + (isNews ? 1 : 0),
      })
      const { academyId } = reach
      if (isNews) {
        const isLive = clinic.state !== 'draft'
        await setSessionParts(trx, { sessionId, ...times, coachIds, areas, isLive })
        await services.outbox.emit(trx, 'session.changed', { academyId, sessionId })
      }
      if (capacity > session.capacity) {
        await services.outbox.emit(trx, 'places.opened', { academyId, clinicId: clinic.id })
      }
      return viewOne(trx, sessionId)
    }),
  )
}

function refuseEnded(session: Session): void {
  if (session.state === 'called-off') {
    throw new Problem('already-decided', 'This session has been called off.')
  }
  if (session.registerState === 'closed') {
    throw new Problem('register-closed', 'The register of this session is closed.')
  }
}

/** A session that is ahead stays ahead; the time of one that has been held may be put right. */
function refuseThePast(given: { session: Session; times: { startsAt: Date }; now: Date }): void {
  const { session, times, now } = given
  if (session.startsAt <= now || times.startsAt > now) return
  const sentence = 'This is in the past.'
  throw new Problem('invalid-fields', sentence, { startsOnLocal: sentence })
}

function newTimes(
  session: Session,
  change: Parsed<'sessions.change', 'body'>,
  zone: string,
): { startsAt: Date; endsAt: Date; heldOn: string } {
  const local = toLocal({ at: session.startsAt, zone })
  const startsOnLocal = change.startsOnLocal ?? session.heldOn
  const startsAtLocal = change.startsAtLocal ?? local.timeLocal
  const hadMinutes = (session.endsAt.getTime() - session.startsAt.getTime()) / 60_000
  const startsAt = toInstant({ startsOnLocal, startsAtLocal, zone })
  const endsAt = new Date(startsAt.getTime() + (change.durationMinutes ?? hadMinutes) * 60_000)
  return { startsAt, endsAt, heldOn: startsOnLocal }
}

function checkCapacity(session: Session, capacity: number = session.capacity): number {
  const taken = session.held + session.confirmed
  if (capacity >= taken) return capacity
  const sentence = `${taken} places are taken already.`
  throw new Problem('invalid-fields', sentence, { capacity: sentence })
}

/** Calls one session off. Places, money, mail and calendars follow from the event, once. */
export async function callOffSession(
  services: Services,
  wanted: { reach: SessionReach; sessionId: string; reason: string },
): Promise<SessionView> {
  const { reach, sessionId, reason } = wanted
  return inAcademy(services.db, reach.academyId, async (trx) => {
    const session = await lockReachableSession(trx, { reach, sessionId })
    // A second press finds it called off already, and changes nothing.
    if (session.state === 'called-off') return viewOne(trx, sessionId)
    refuseEnded(session)
    await updateSession(trx, sessionId, {
      state: 'called-off',
      calledOffAt: services.clock.now(),
      calledOffReason: reason,
      calendarSequence: session.calendarSequence + 1,
    })
    await releaseSessionParts(trx, sessionId)
    const { academyId } = reach
    await services.outbox.emit(trx, 'session.called-off', { academyId, sessionId })
    return viewOne(trx, sessionId)
  })
}

async function viewOne(trx: AcademyTrx, sessionId: string): Promise<SessionView> {
  const session = await findSession(trx, sessionId)
  const [view] = session ? await viewSessions(trx, [session]) : []
  if (!view) throw notFound('session')
  return view
}

const LONGEST_BOARD_DAYS = 62

/** The sessions of some days, for the week board. */
export async function readBoard(
  { db }: Services,
  { reach, from, to }: { reach: SessionReach; from: string; to: string },
): Promise<Answer<'sessions.list'>> {
  return inAcademy(db, reach.academyId, async (trx) => {
    const { zone, duskKind } = await readAcademy(trx)
    const days = daysBetween(from, to)
    const coach = reach.scope === 'own' ? await findCoachOf(trx, reach.accountId) : undefined
    const sessions = await listSessionsBetween(trx, {
      from,
      to,
      ...(coach ? { coachId: coach.id } : {}),
    })
    const views = await viewSessions(trx, sessions)
    const venues = await listVenues(trx)
    const [first] = venues
    return {
      zone,
      areas: (await listAreas(trx)).map(({ id, name, hasLamps, isCovered, venueId }) => ({
        id,
        name,
        hasLamps,
        isCovered,
        venueName: nameOf(venues, venueId),
      })),
      days: days.map((dayLocal) => ({
        dayLocal,
        duskAt: first ? (duskOver(first, { dayLocal, duskKind })?.toISOString() ?? null) : null,
      })),
      sessions: sessions.flatMap(({ clinicId, clinicTitle, heldOn, zone }, index) => {
        const view = views[index]
        return view ? [{ ...view, clinicId, clinicTitle, heldOn, zone }] : []
      }),
    }
  })
}

const nameOf = (venues: readonly Venue[], id: string): string =>
  venues.find((venue) => venue.id === id)?.name ?? ''

function daysBetween(from: string, to: string): string[] {
  const days: string[] = []
  for (let day = from; day <= to; day = dayAfter(day)) {
    if (days.length === LONGEST_BOARD_DAYS) {
      throw new Problem('invalid-fields', `At most ${LONGEST_BOARD_DAYS} days at once.`)
    }
    days.push(day)
  }
  return days
}

function dayAfter(day: string): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) + 86_400_000).toISOString().slice(0, 10)
}
