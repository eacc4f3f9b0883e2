import type { Answer, Parsed } from '@marram/contract'
import { readAcademy, type Academy } from '../academies/academies'
import { toSlug } from '../academies/rules'
import { Problem, notFound } from '../platform/errors'
import { newId } from '../platform/ids'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { findCoaches } from '../coaches/coaches'
import { findVenue } from '../venues/venues'
import { sayClashes } from './clashes'
import { duskOver } from './light'
import type { Clinic, Session } from './models'
import { planClinic, type Plan } from './plan'
import {
  countPlacesOf,
  countWaiting,
  deleteClinic,
  deleteSessions,
  findClinic,
  insertClinic,
  insertSession,
  listClinics,
  listSessionsOf,
  listSlugsLike,
  lockClinic,
  lockSessionsOf,
  readClinicParts,
  setClinicLive,
  setClinicParts,
  setSessionParts,
  updateClinic,
  updateSession,
} from './queries'
import { checkLevel, checkPrices, describeRule, isSameSchedule } from './rules'
import { viewSessions } from './views'

type ClinicView = Answer<'clinics.read'>
type Wanted = Parsed<'clinics.draft', 'body'>

/** Writes a clinic down as a draft, with a session for each of its dates. */
export async function draftClinic(
  { db, clock }: Services,
  { academyId, wanted }: { academyId: string; wanted: Wanted },
): Promise<ClinicView> {
  checkPrices(wanted)
  checkLevel(wanted)
  return inAcademy(db, academyId, async (trx) => {
    const now = clock.now()
    const id = newId(now)
    const academy = await readAcademy(trx)
    const plan = await planClinic(trx, wanted)
    const { coachIds, areas, ...fields } = wanted
    const zone = plan.venue.zone
    await insertAtFreeSlug(trx, { id, ...fields, zone, state: 'draft', createdAt: now })
    await setClinicParts(trx, id, { coachIds, areas })
    await makeSessions(trx, { academy, plan, wanted, clinicId: id, isLive: false, now })
    return readView(trx, id)
  })
}

async function makeSessions(
  trx: AcademyTrx,
  given: {
    academy: Academy
    plan: Plan
    wanted: Wanted
    clinicId: string
    isLive: boolean
    now: Date
  },
): Promise<void> {
  const { academy, plan, wanted, clinicId, isLive, now } = given
  const { coachIds, areas } = wanted
  for (const { number, startsOnLocal, startsAt, endsAt } of plan.dates) {
    const id = newId(now)
    const dusk = { dayLocal: startsOnLocal, duskKind: academy.duskKind }
    await insertSession(trx, {
      id,
      clinicId,
      number,
      heldOn: startsOnLocal,
      startsAt,
      endsAt,
      duskAt: duskOver(plan.venue, dusk),
      capacity: wanted.capacity,
    })
    await setSessionParts(trx, { sessionId: id, startsAt, endsAt, coachIds, areas, isLive })
  }
}

/** An address that somebody else takes in this moment is passed over for the next. */
async function insertAtFreeSlug(
  trx: AcademyTrx,
  row: Partial<Clinic> & { title: string },
): Promise<void> {
  while (!(await insertClinic(trx, { ...row, slug: await freeSlug(trx, row.title) })));
}

async function freeSlug(trx: AcademyTrx, title: string): Promise<string> {
  const slug = toSlug(title) || 'clinic'
  const taken = new Set(await listSlugsLike(trx, slug))
  if (!taken.has(slug)) return slug
  for (let number = 2; ; number += 1) {
    if (!taken.has(`${slug}-${number}`)) return `${slug}-${number}`
  }
}

/**
 * Changes a clinic. Its dates, coaches and areas can be changed as a whole until somebody has a
 * place; afterwards sessions are changed one by one, so that nobody's evening moves unnoticed.
 */
export async function changeClinic(
  { db, clock, outbox }: Services,
  { academyId, clinicId, wanted }: { academyId: string; clinicId: string; wanted: Wanted },
): Promise<ClinicView> {
  checkPrices(wanted)
  checkLevel(wanted)
  return inAcademy(db, academyId, (trx) =>
    sayClashes(async () => {
      const clinic = await lockClinic(trx, clinicId)
      if (!clinic) throw notFound('clinic')
      const { coachIds, areas, ...fields } = wanted
      const had = await readClinicParts(trx, clinicId)
      const sessions = await lockSessionsOf(trx, clinicId)
      if (!isSameSchedule({ ...clinic, ...had }, wanted)) {
        const ids = sessions.map(({ id }) => id)
        if ((await countPlacesOf(trx, ids)) > 0) {
          throw new Problem(
            'not-allowed',
            'Golfers have places already. Change the sessions one by one instead.',
          )
        }
        const plan = await planClinic(trx, wanted)
        await deleteSessions(trx, ids)
        await updateClinic(trx, clinicId, { ...fields, zone: plan.venue.zone })
        await setClinicParts(trx, clinicId, { coachIds, areas })
        const academy = await readAcademy(trx)
        const isLive = clinic.state === 'published'
        const now = clock.now()
        await makeSessions(trx, { academy, plan, wanted, clinicId, isLive, now })
      } else {
        await updateClinic(trx, clinicId, fields)
        if (wanted.capacity !== clinic.capacity) await setCapacity(trx, sessions, wanted.capacity)
        if (wanted.capacity > clinic.capacity) {
          await outbox.emit(trx, 'places.opened', { academyId, clinicId })
        }
      }
      return readView(trx, clinicId)
    }),
  )
}

async function setCapacity(
  trx: AcademyTrx,
  sessions: readonly Session[],
  capacity: number,
): Promise<void> {
  const fullest = Math.max(0, ...sessions.map(({ held, confirmed }) => held + confirmed))
  if (capacity < fullest) {
    const sentence = `${fullest} places are taken already.`
    throw new Problem('invalid-fields', sentence, { capacity: sentence })
  }
  for (const { id } of sessions) await updateSession(trx, id, { capacity })
}

/** Puts a clinic on the page, which gives it its coaches and bays, or takes it off again. */
export async function publishClinic(
  { db, outbox }: Services,
  wanted: { academyId: string; clinicId: string; isPublished: boolean },
): Promise<ClinicView> {
  const { academyId, clinicId, isPublished } = wanted
  return inAcademy(db, academyId, (trx) =>
    sayClashes(async () => {
      const clinic = await lockClinic(trx, clinicId)
      if (!clinic) throw notFound('clinic')
      const isNow = clinic.state === 'published'
      if (isNow !== isPublished) {
        await updateClinic(trx, clinicId, { state: isPublished ? 'published' : 'withdrawn' })
        // A withdrawn clinic still holds the sessions that golfers have places in.
        if (isPublished) {
          await setClinicLive(trx, { clinicId, isLive: true })
          await outbox.emit(trx, 'places.opened', { academyId, clinicId })
        }
      }
      return readView(trx, clinicId)
    }),
  )
}

/** Throws a draft away. What golfers have had places in stays. */
export async function throwClinicAway(
  { db }: Services,
  { academyId, clinicId }: { academyId: string; clinicId: string },
): Promise<void> {
  await inAcademy(db, academyId, async (trx) => {
    const clinic = await lockClinic(trx, clinicId)
    if (!clinic) throw notFound('clinic')
    if (clinic.state !== 'draft') {
      throw new Problem(
        'not-allowed',
        'Only a draft can be thrown away. Take it off the page instead.',
      )
    }
    await deleteClinic(trx, clinicId)
  })
}

export async function readClinics(
  { db, clock }: Services,
  academyId: string,
): Promise<Answer<'clinics.list'>> {
  return inAcademy(db, academyId, async (trx) => {
    const rows = await listClinics(trx, clock.now())
    return {
      clinics: rows.map((row) => ({
        id: row.id,
        slug: row.slug,
        title: row.title,
        state: row.state,
        sessionsHeld: row.sessionsHeld,
        sessionsTotal: row.sessionsTotal,
        nextStartsAt: row.nextStartsAt?.toISOString() ?? null,
        firstStartsAt: row.firstStartsAt?.toISOString() ?? null,
        lastStartsAt: row.lastStartsAt?.toISOString() ?? null,
        capacity: row.capacity,
        taken: row.taken,
        waiting: row.waiting,
        coaches: row.coaches,
        runPriceMinor: row.runPriceMinor,
        dropInPriceMinor: row.dropInPriceMinor,
      })),
    }
  })
}

export async function readClinic(
  { db }: Services,
  { academyId, clinicId }: { academyId: string; clinicId: string },
): Promise<ClinicView> {
  return inAcademy(db, academyId, (trx) => readView(trx, clinicId))
}

async function readView(trx: AcademyTrx, clinicId: string): Promise<ClinicView> {
  const clinic = await findClinic(trx, clinicId)
  if (!clinic) throw notFound('clinic')
  const { coachIds, areas } = await readClinicParts(trx, clinicId)
  const sessions = await viewSessions(trx, await listSessionsOf(trx, clinicId))
  const venue = await findVenue(trx, clinic.venueId)
  const coaches = new Map((await findCoaches(trx, coachIds)).map((coach) => [coach.id, coach]))
  return {
    ...fieldsOf(clinic),
    coachIds,
    areas,
    id: clinic.id,
    slug: clinic.slug,
    zone: clinic.zone,
    state: clinic.state,
    recurrence: describeRule(clinic),
    venueName: venue?.name ?? '',
    coaches: coachIds.flatMap((id) => {
      const coach = coaches.get(id)
      return coach ? [{ id, name: coach.name, initials: coach.initials }] : []
    }),
    sessions,
    waiting: await countWaiting(trx, clinicId),
  }
}

function fieldsOf(clinic: Clinic): Omit<Wanted, 'coachIds' | 'areas'> {
  return {
    title: clinic.title,
    summary: clinic.summary,
    about: clinic.about,
    bring: clinic.bring,
    handicapMin: clinic.handicapMin,
    handicapMax: clinic.handicapMax,
    ageMin: clinic.ageMin,
    ageMax: clinic.ageMax,
    capacity: clinic.capacity,
    saleMode: clinic.saleMode,
    payMode: clinic.payMode,
    runPriceMinor: clinic.runPriceMinor,
    dropInPriceMinor: clinic.dropInPriceMinor,
    venueId: clinic.venueId,
    startsOnLocal: clinic.startsOnLocal,
    startsAtLocal: clinic.startsAtLocal.slice(0, 5),
    durationMinutes: clinic.durationMinutes,
    rrule: clinic.rrule,
    skipDates: clinic.skipDates,
  }
}

export {
  findClinic,
  findSession,
  isCoachOfClinic,
  isCoachOfSession,
  listSessionsBetween,
  listSessionsOf,
  lockSession,
  updateSession,
} from './queries'
export { viewSessions } from './views'
export type { Clinic, Session } from './models'
