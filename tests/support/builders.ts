import type { Answer, Sent } from '@marram/contract'
import { nextNumber, signUp, type SignedUp } from './people'
import type { World } from './world'

export {
  PASSWORD,
  joinStaff,
  nextNumber,
  secretMailedTo,
  signUp,
  verify,
  type SignedUp,
} from './people'

export type ClinicView = Answer<'clinics.read'>
export type EnrolmentView = Answer<'enrolments.read'>

export interface OpenAcademy {
  slug: string
  owner: SignedUp
  venue: Answer<'venues.add'>
  area: Answer<'areas.add'>
  coach: Answer<'coaches.add'>
  clinic: ClinicView
}

/** An academy ready for its season: venue, area, coach, payments and a published clinic. */
export async function openAcademy(
  world: World,
  given: { owner?: SignedUp; clinic?: Partial<Sent<'clinics.draft', 'body'>> } = {},
): Promise<OpenAcademy> {
  const number = nextNumber()
  const owner = given.owner ?? (await signUp(world, { name: `Owner ${number}` }))
  const slug = `links-${number}`
  await owner.person.must('academies.open', {
    body: {
      name: `Links ${number}`,
      place: 'Skerrow',
      slug,
      zone: 'Europe/Dublin',
      currency: 'EUR',
      taxMode: 'included',
    },
  })
  const params = { academy: slug }
  const venue = await owner.person.must('venues.add', {
    params,
    body: { name: 'Skerrow Range', latitudeDeg: 53.4, longitudeDeg: -6.1 },
  })
  const area = await owner.person.must('areas.add', {
    params: { ...params, venueId: venue.id },
    body: { name: 'Range', kind: 'range', units: 12, hasLamps: true, isCovered: true },
  })
  const coach = await owner.person.must('coaches.add', { params, body: { name: 'Bríd Tarrant' } })
  await connectPayments(world, { slug, owner })
  const made = { slug, owner, venue, area, coach }
  const clinic = await publishClinic(made, given.clinic)
  await owner.person.must('academies.publish', { params, body: { isPublished: true } })
  return { ...made, clinic }
}

/** Connects payments as an owner does, on the provider's own page. */
export async function connectPayments(
  world: World,
  { slug, owner }: Pick<OpenAcademy, 'slug' | 'owner'>,
): Promise<void> {
  const params = { academy: slug }
  const { url } = await owner.person.must('payments.connect', { params })
  world.payments.finishOnboarding(new URL(url).pathname.split('/').at(-1) ?? '')
  const { state } = await owner.person.must('payments.read', { params })
  if (state !== 'ready') throw new Error(`payments are ${state}`)
}

/** A clinic of eight Tuesdays at 18:00 for twelve golfers, unless the test says otherwise. */
export async function publishClinic(
  academy: Omit<OpenAcademy, 'clinic'>,
  change: Partial<Sent<'clinics.draft', 'body'>> = {},
): Promise<ClinicView> {
  const { slug, owner, venue, area, coach } = academy
  const params = { academy: slug }
  const body = { ...clinicFields({ venue, area, coach }), ...change }
  const { id: clinicId } = await owner.person.must('clinics.draft', { params, body })
  return owner.person.must('clinics.publish', {
    params: { ...params, clinicId },
    body: { isPublished: true },
  })
}

export function clinicFields(
  at: Pick<OpenAcademy, 'venue' | 'area' | 'coach'>,
): Sent<'clinics.draft', 'body'> {
  return {
    title: 'Wedges to a number',
    summary: 'Three distances you can trust, by the last Tuesday.',
    about: '',
    bring: '',
    handicapMin: null,
    handicapMax: null,
    ageMin: null,
    ageMax: null,
    capacity: 12,
    saleMode: 'both',
    payMode: 'card',
    runPriceMinor: 24_000,
    dropInPriceMinor: 3_500,
    venueId: at.venue.id,
    startsOnLocal: '2031-04-01',
    startsAtLocal: '18:00',
    durationMinutes: 60,
    rrule: 'FREQ=WEEKLY;BYDAY=TU;COUNT=8',
    skipDates: [],
    coachIds: [at.coach.id],
    areas: [{ areaId: at.area.id, fromUnit: 1, toUnit: 6 }],
  }
}

/** Takes a place for oneself: of the whole run, or of one session. The place is then held. */
export function takePlace(
  golfer: SignedUp,
  academy: Pick<OpenAcademy, 'slug'>,
  what: { clinic: ClinicView; sessionId?: string },
): Promise<EnrolmentView> {
  const { clinic, sessionId } = what
  return golfer.person.must('enrolments.hold', {
    params: { academy: academy.slug },
    body: {
      clinicId: clinic.id,
      ...(sessionId ? { sessionId } : {}),
      for: { kind: 'me' },
      hasAcceptedWaiver: true,
    },
  })
}

/** Pays a held place on the provider's page, and lets everybody hear of it. */
export async function pay(
  world: World,
  golfer: SignedUp,
  given: { academy: Pick<OpenAcademy, 'slug'>; enrolment: EnrolmentView; card?: string },
): Promise<EnrolmentView> {
  const { academy, enrolment, card } = given
  const params = { academy: academy.slug, enrolmentId: enrolment.id }
  const { url } = await golfer.person.must('checkout.start', { params })
  world.payments.pay(new URL(url).pathname.split('/').at(-1) ?? '', card)
  await world.drain()
  return golfer.person.must('enrolments.read', { params })
}
