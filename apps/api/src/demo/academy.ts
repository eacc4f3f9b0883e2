import { changeSettings, openAcademy, publishAcademy } from '../academies/academies'
import { connectPayments, readPaymentsAccount } from '../checkout/payments-account'
import { draftClinic, publishClinic } from '../clinics/clinics'
import { addCoach } from '../coaches/coaches'
import type { Services } from '../platform/services'
import { findAcademyBySlug } from '../platform/tenancy/look-ups'
import { addArea, addVenue } from '../venues/venues'
import type { DemoProvider } from './demo-provider'
import { makePerson } from './golfers'
import type { AcademyScript, ClinicScript } from './script'
import { joinStaff } from './staff'

type ClinicView = Awaited<ReturnType<typeof draftClinic>>

export interface BuiltClinic {
  script: ClinicScript
  view: ClinicView
}

export interface BuiltAcademy {
  academyId: string
  ownerId: string
  /** Accounts of coaches by name; they take their own registers. */
  coachAccounts: Map<string, string>
  clinics: BuiltClinic[]
}

const DAY_MS = 86_400_000

/** Opens an academy and sets it up as its owner would: venues, coaches, staff, payments, clinics. */
export async function buildAcademy(
  services: Services,
  provider: DemoProvider,
  script: AcademyScript,
  today: Date,
): Promise<BuiltAcademy> {
  const [owner] = script.staff
  if (!owner) throw new Error('an academy has an owner')
  const account = async (person: { name: string; email: string }) =>
    (await makePerson(services, { name: person.name, email: person.email })).id
  const ownerId = await account({ name: owner.name, email: owner.email })
  await openAcademy(services, { accountId: ownerId, wanted: script.open })
  const academyId = await findAcademyBySlug(services.db, script.open.slug)
  if (!academyId) throw new Error('the academy was just opened')
  await changeSettings(services, { academyId, change: script.settings })

  const areas = new Map<string, { areaId: string; venueId: string; units: number }>()
  for (const { areas: parts, ...wanted } of script.venues) {
    const venue = await addVenue(services, { academyId, wanted })
    for (const area of parts) {
      const made = await addArea(services, { academyId, venueId: venue.id, area })
      areas.set(area.name, { areaId: made.id, venueId: venue.id, units: area.units })
    }
  }

  const coaches = new Map<string, string>()
  const coachAccounts = new Map<string, string>()
  for (const { name, email, about } of script.coaches) {
    const accountId = await account({ name, email })
    const coach = await addCoach(services, {
      academyId,
      addedBy: ownerId,
      coach: { name, about, ...(accountId === ownerId ? { invite: email } : {}) },
    })
    coaches.set(name, coach.id)
    coachAccounts.set(name, accountId)
    if (accountId !== ownerId) {
      await joinStaff(services, { academyId, accountId, role: 'coach', coachId: coach.id })
    }
  }
  for (const { role, ...person } of script.staff.slice(1)) {
    const accountId = await account({ name: person.name, email: person.email })
    await joinStaff(services, { academyId, accountId, role, coachId: null })
  }

  await connectPayments(services, provider, { academyId, email: owner.email })
  await provider.finishOnboarding()
  await readPaymentsAccount(services, provider, academyId)

  const clinics: BuiltClinic[] = []
  for (const clinic of script.clinics) {
    const area = areas.get(clinic.area)
    const coachId = coaches.get(clinic.coach)
    if (!area || !coachId) throw new Error(`${clinic.title} names an area and a coach`)
    const wanted = wantedClinic(clinic, { ...area, coachId, today })
    const draft = await draftClinic(services, { academyId, wanted })
    const view = clinic.isDraft
      ? draft
      : await publishClinic(services, { academyId, clinicId: draft.id, isPublished: true })
    clinics.push({ script: clinic, view })
  }
  await publishAcademy(services, { academyId, isPublished: true })
  return { academyId, ownerId, coachAccounts, clinics }
}

function wantedClinic(
  script: ClinicScript,
  given: { areaId: string; venueId: string; units: number; coachId: string; today: Date },
): Parameters<typeof draftClinic>[1]['wanted'] {
  const { areaId, venueId, units, coachId, today } = given
  const isDropIn = script.runPriceMinor === undefined && script.payMode !== 'free'
  const isBoth = script.runPriceMinor !== undefined && script.dropInPriceMinor !== undefined
  const day = ['MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU'][script.weekday - 1] ?? 'MO'
  const isSecondWeekly = script.payMode === 'free'
  return {
    title: script.title,
    summary: script.summary,
    about: script.about,
    bring: script.bring,
    handicapMin: script.handicaps?.[0] ?? null,
    handicapMax: script.handicaps?.[1] ?? null,
    ageMin: script.ages?.[0] ?? null,
    ageMax: script.ages?.[1] ?? null,
    capacity: script.capacity,
    saleMode: isBoth ? 'both' : isDropIn || isSecondWeekly ? 'drop-in' : 'run',
    payMode: script.payMode ?? 'card',
    runPriceMinor: script.runPriceMinor ?? null,
    dropInPriceMinor: script.dropInPriceMinor ?? null,
    venueId,
    startsOnLocal: dayInWeek(today, script.startsInWeeks, script.weekday),
    startsAtLocal: script.at,
    durationMinutes: script.minutes,
    rrule: `FREQ=WEEKLY;${isSecondWeekly ? 'INTERVAL=2;' : ''}BYDAY=${day};COUNT=${script.sessions}`,
    skipDates: [],
    coachIds: [coachId],
    areas: [{ areaId, fromUnit: script.fromUnit ?? 1, toUnit: script.toUnit ?? units }],
  }
}

/** A weekday of the week that lies some weeks from this one, as a local date. */
function dayInWeek(today: Date, weeks: number, weekday: number): string {
  const noon = new Date(`${today.toISOString().slice(0, 10)}T12:00:00Z`)
  const sinceMonday = (noon.getUTCDay() + 6) % 7
  const day = noon.getTime() + (weeks * 7 + weekday - 1 - sinceMonday) * DAY_MS
  return new Date(day).toISOString().slice(0, 10)
}
