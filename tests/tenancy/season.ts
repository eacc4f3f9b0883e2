import {
  joinStaff,
  nextNumber,
  openAcademy,
  pay,
  publishClinic,
  signUp,
  takePlace,
  type ClinicView,
  type EnrolmentView,
  type OpenAcademy,
  type SignedUp,
} from '../support/builders'
import { swingFields } from '../support/swings'
import type { World } from '../support/world'

/** An academy with a season behind it: at least one row in every table of an academy. */
export interface Season extends OpenAcademy {
  /** Of the golfer's own run. */
  enrolment: EnrolmentView
  /** Of a junior's run, whose guardian the golfer is. */
  dependantId: string
  golferId: string
  putting: ClinicView
  desk: SignedUp
  coachPerson: SignedUp
  /** On the staff, without a session of their own. */
  otherCoach: SignedUp
  bookkeeper: SignedUp
  golfer: SignedUp
  /** Waits for the full clinic, and has given a place up. */
  waiting: SignedUp
  waitlistEntryId: string
  /** Two of the golfer's own, recorded by their coach. */
  swingId: string
  laterSwingId: string
}

/** Opens an academy and sells its places; the season has not begun. */
export async function sellSeason(world: World): Promise<Season> {
  const academy = await openAcademy(world, { clinic: { capacity: 2 } })
  const coachId = academy.coach.id
  const desk = await joinStaff(world, academy, { role: 'desk' })
  const coachPerson = await joinStaff(world, academy, { role: 'coach', coachId })
  const otherCoach = await joinStaff(world, academy, { role: 'coach' })
  const bookkeeper = await joinStaff(world, academy, { role: 'bookkeeper' })
  await invite(academy)
  const golfer = await signUp(world)
  const waiting = await signUp(world)
  const params = { academy: academy.slug }

  const held = await takePlace(golfer, academy, { clinic: academy.clinic })
  const enrolment = await pay(world, golfer, { academy, enrolment: held })
  const { id: dependantId } = await golfer.person.must('golfers.add-dependant', {
    params,
    body: dependant(),
  })
  const junior = await golfer.person.must('enrolments.hold', {
    params,
    body: {
      clinicId: academy.clinic.id,
      for: { kind: 'golfer', golferId: dependantId },
      hasAcceptedWaiver: true,
    },
  })
  await pay(world, golfer, { academy, enrolment: junior })

  const putting = await publishClinic(academy, {
    title: 'Holing out',
    capacity: 100,
    startsOnLocal: '2031-04-02',
    rrule: 'FREQ=WEEKLY;BYDAY=WE;COUNT=4',
  })
  const given = await takePlace(waiting, academy, { clinic: putting })
  await giveUp(world, waiting, { academy, enrolment: given })
  const { id: waitlistEntryId } = await waiting.person.must('waitlist.join', {
    params,
    body: { clinicId: academy.clinic.id, golferId: given.golfer.id },
  })
  return {
    ...academy,
    enrolment,
    dependantId,
    golferId: enrolment.golfer.id,
    putting,
    desk,
    coachPerson,
    otherCoach,
    bookkeeper,
    golfer,
    waiting,
    waitlistEntryId,
    ...(await coachGolfer({ ...academy, coachPerson, golferId: enrolment.golfer.id })),
  }
}

/** Records two swings before the season, with what they are to come to; the owner sets how to read. */
async function coachGolfer(
  season: OpenAcademy & Pick<Season, 'coachPerson' | 'golferId'>,
): Promise<Pick<Season, 'swingId' | 'laterSwingId'>> {
  const { slug, clinic, coachPerson, golferId, owner } = season
  const params = { academy: slug, golferId }
  const sessionId = clinic.sessions[0]?.id ?? null
  const body = { ...swingFields(), sessionId }
  const { id: swingId } = await coachPerson.person.must('swings.record', { params, body })
  const { id: laterSwingId } = await coachPerson.person.must('swings.record', { params, body })
  const { wrist } = swingFields()
  await coachPerson.person.must('targets.set', { params, body: { club: null, wrist } })
  await owner.person.must('coaching-settings.change', { params, body: { toleranceDeg: 3 } })
  return { swingId, laterSwingId }
}

/** Holds the first session, calls the second off, and looks at what is written of the junior. */
export async function playFirstEvening(world: World, season: Season): Promise<void> {
  const { slug, clinic, coachPerson, desk, golfer, dependantId } = season
  const [first, second] = clinic.sessions
  if (!first || !second) throw new Error('a run has two sessions')
  await markEverybody(season, first.id)
  await coachPerson.person.must('register.close', {
    params: { academy: slug, sessionId: first.id },
    body: { revision: 0 },
  })
  await desk.person.must('sessions.call-off', {
    params: { academy: slug, sessionId: second.id },
    body: { reason: 'Lightning' },
  })
  await desk.person.must('golfers.read', { params: { academy: slug, golferId: dependantId } })
  await world.drain()
  const { enrolments } = await golfer.person.must('enrolments.mine', { params: { academy: slug } })
  const owed = enrolments.flatMap(({ places }) => places).find((place) => place.owed)
  if (!owed) throw new Error('a called-off session is owed')
  await golfer.person.must('checkout.choose', {
    params: { academy: slug, placeId: owed.id },
    body: { choice: 'credit' },
  })
  await world.drain()
}

export async function markEverybody(season: Season, sessionId: string): Promise<void> {
  const { person } = season.coachPerson
  const params = { academy: season.slug, sessionId }
  const { rows } = await person.must('register.read', { params })
  for (const { placeId } of rows) {
    const body = { mark: 'present' } as const
    await person.must('register.mark', { params: { ...params, placeId }, body })
  }
}

/** Another child each time: the same one sent again would be the one that is there already. */
export function dependant() {
  return {
    name: `Junior Quillan ${nextNumber()}`,
    bornOn: '2021-05-04',
    handicap: null,
    emergencyContact: { name: 'Quillan', phone: '+353 1 555 0100' },
    hasConsent: true,
  } as const
}

async function invite({ slug, owner }: OpenAcademy): Promise<void> {
  const body = { email: `nobody-yet@${slug}.example`, role: 'desk' } as const
  await owner.person.must('invitations.send', { params: { academy: slug }, body })
}

async function giveUp(
  world: World,
  golfer: SignedUp,
  { academy, enrolment }: { academy: OpenAcademy; enrolment: EnrolmentView },
): Promise<void> {
  await pay(world, golfer, { academy, enrolment })
  const params = { academy: academy.slug, enrolmentId: enrolment.id }
  const { refundMinor } = await golfer.person.must('checkout.quote-giving-up', { params })
  await golfer.person.must('checkout.give-up', { params, body: { refundMinor } })
  await world.drain()
}
