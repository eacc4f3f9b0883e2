import type { Sent } from '@marram/contract'
import { clinicFields, joinStaff, nextNumber } from '../support/builders'
import { swingFields } from '../support/swings'
import type { World } from '../support/world'
import { dependant, type Season } from './season'

/** What the sample calls use up or need, made by people who may make it. */

export async function memberToRemove(season: Season, world: World) {
  const { account } = await joinStaff(world, season, { role: 'bookkeeper' })
  return { params: { accountId: account.id, role: 'bookkeeper' } }
}

export async function openInvitation(season: Season): Promise<{ invitationId: string }> {
  const { id } = await season.owner.person.must('invitations.send', {
    params: { academy: season.slug },
    body: { email: `invited-${nextNumber()}@mail.example`, role: 'desk' },
  })
  return { invitationId: id }
}

/** A coach who does not sign in yet. */
export async function untiedCoach(season: Season): Promise<string> {
  const params = { academy: season.slug }
  const body = { name: 'Eithne Gorse' }
  const { id } = await season.owner.person.must('coaches.add', { params, body })
  return id
}

export function scheduleOf(season: Season): Sent<'clinics.preview', 'body'> {
  const fields = clinicFields(season)
  const { venueId, startsOnLocal, startsAtLocal, durationMinutes } = fields
  const { rrule, skipDates, coachIds, areas } = fields
  return {
    ...{ venueId, startsOnLocal, startsAtLocal, durationMinutes },
    ...{ rrule, skipDates, coachIds, areas },
  }
}

export async function draft(season: Season): Promise<{ clinicId: string }> {
  const params = { academy: season.slug }
  const body = clinicFields(season)
  const { id } = await season.owner.person.must('clinics.draft', { params, body })
  return { clinicId: id }
}

/** The session of the full clinic that lies furthest ahead. */
export async function lastPlannedSession(season: Season): Promise<string> {
  const { sessions } = await season.owner.person.must('clinics.read', {
    params: { academy: season.slug, clinicId: season.clinic.id },
  })
  const last = sessions.filter(({ state }) => state === 'planned').at(-1)
  if (!last || last.number < 3) throw new Error('the season has run out of sessions')
  return last.id
}

export async function newDependant(season: Season): Promise<string> {
  const { id } = await season.golfer.person.must('golfers.add-dependant', {
    params: { academy: season.slug },
    body: dependant(),
  })
  return id
}

/** A drop-in to the last putting session, for somebody whom the golfer looks after. */
export function dropIn(season: Season, golferId: string): Sent<'enrolments.hold', 'body'> {
  const session = season.putting.sessions.at(-1)
  if (!session) throw new Error('a clinic has sessions')
  return {
    clinicId: season.putting.id,
    sessionId: session.id,
    for: { kind: 'golfer', golferId },
    hasAcceptedWaiver: true,
  }
}

export async function hold(season: Season): Promise<{ enrolmentId: string }> {
  const { id } = await season.golfer.person.must('enrolments.hold', {
    params: { academy: season.slug },
    body: dropIn(season, await newDependant(season)),
  })
  return { enrolmentId: id }
}

/** The golfer's place that is promised at the desk: confirmed, with nothing paid yet. */
export async function confirmed(season: Season): Promise<{ enrolmentId: string }> {
  const held = await hold(season)
  const params = { academy: season.slug, ...held }
  await season.golfer.person.must('checkout.at-desk', { params })
  return held
}

export async function enteredGolfer(season: Season): Promise<string> {
  const params = { academy: season.slug }
  const body = { name: 'Walk-in Farrelly' }
  const { id } = await season.desk.person.must('golfers.enter', { params, body })
  return id
}

export async function waitlistEntry(season: Season): Promise<{ entryId: string }> {
  const { id } = await season.golfer.person.must('waitlist.join', {
    params: { academy: season.slug },
    body: { clinicId: season.clinic.id, golferId: await newDependant(season) },
  })
  return { entryId: id }
}

/** A place of the golfer's in a session that has just been called off. */
export async function owedPlace(season: Season, world: World): Promise<string> {
  const sessionId = await lastPlannedSession(season)
  await season.owner.person.must('sessions.call-off', {
    params: { academy: season.slug, sessionId },
    body: { reason: 'Storm' },
  })
  await world.drain()
  const { places } = await season.golfer.person.must('enrolments.read', {
    params: { academy: season.slug, enrolmentId: season.enrolment.id },
  })
  const owed = places.find((place) => place.sessionId === sessionId)
  if (!owed?.owed) throw new Error('a called-off session is owed')
  return owed.id
}

export function firstSession({ clinic }: Season): string {
  const [first] = clinic.sessions
  if (!first) throw new Error('a clinic has sessions')
  return first.id
}

export async function placeToMark(season: Season) {
  await openRegister(season)
  const [row] = (await readRegister(season)).rows
  if (!row) throw new Error('somebody is in the register')
  return { sessionId: firstSession(season), placeId: row.placeId }
}

/** Makes sure that the first session's register is open; resolves to its revision. */
export async function openRegister(season: Season): Promise<number> {
  const { session, revision } = await readRegister(season)
  if (session.registerState === 'open') return revision
  const params = { academy: season.slug, sessionId: session.id }
  const opened = await season.owner.person.must('register.reopen', { params, body: { revision } })
  return opened.revision
}

/** Makes sure that it is closed; resolves to its revision. */
export async function closedRegister(season: Season): Promise<number> {
  const { session, revision } = await readRegister(season)
  if (session.registerState === 'closed') return revision
  const params = { academy: season.slug, sessionId: session.id }
  const closed = await season.owner.person.must('register.close', { params, body: { revision } })
  return closed.revision
}

function readRegister(season: Season) {
  const params = { academy: season.slug, sessionId: firstSession(season) }
  return season.owner.person.must('register.read', { params })
}

/** One that the coach recorded, to be taken out. */
export async function swing(season: Season): Promise<string> {
  const { id } = await season.coachPerson.person.must('swings.record', {
    params: { academy: season.slug, golferId: season.golferId },
    body: swingFields(),
  })
  return id
}
