import { z } from 'zod'
import { amountMinor, id, instant, line, localDate, localTime, prose, slug } from './fields'
import { handicap } from './golfers'

export const SALE_MODES = ['run', 'drop-in', 'both'] as const
export const PAY_MODES = ['card', 'desk', 'free'] as const

/** The units `fromUnit` to `toUnit` (both included, counted from 1) of an area. */
export const areaUse = z.strictObject({
  areaId: id,
  fromUnit: z.int().min(1).max(200),
  toUnit: z.int().min(1).max(200),
})

export const clinicFields = z.strictObject({
  title: line(80),
  summary: line(160),
  about: prose(2_000),
  bring: prose(300),
  handicapMin: handicap.nullable(),
  handicapMax: handicap.nullable(),
  ageMin: z.int().min(0).max(120).nullable(),
  ageMax: z.int().min(0).max(120).nullable(),
  capacity: z.int().min(1).max(200),
  saleMode: z.enum(SALE_MODES),
  payMode: z.enum(PAY_MODES),
  runPriceMinor: amountMinor.nullable(),
  dropInPriceMinor: amountMinor.nullable(),
  venueId: id,
  startsOnLocal: localDate,
  startsAtLocal: localTime,
  durationMinutes: z.int().min(15).max(600),
  /** An RFC 5545 RRULE without DTSTART, for instance `FREQ=WEEKLY;BYDAY=TU;COUNT=8`. */
  rrule: z.string().min(1).max(300),
  skipDates: z.array(localDate).max(60),
  coachIds: z.array(id).min(1).max(6),
  areas: z.array(areaUse).min(1).max(6),
})

/** Who or what is in the way of a session: said in words, before anything is saved. */
export const clashView = z.object({
  kind: z.enum(['coach', 'area']),
  /** "Aoife Kerrane has Wedges to a number until 18:00." */
  sentence: z.string(),
})

export const previewDate = z.object({
  number: z.int(),
  startsOnLocal: localDate,
  startsAt: instant,
  endsAt: instant,
  duskAt: instant.nullable(),
  /** Minutes of the session after dusk with no lamps and no roof over it; 0 when none. */
  darkMinutes: z.int(),
  isPast: z.boolean(),
  clashes: z.array(clashView),
})

export const areaBrief = z.object({
  id,
  name: z.string(),
  hasLamps: z.boolean(),
  isCovered: z.boolean(),
})
export const coachBrief = z.object({ id, name: z.string(), initials: z.string() })

export const sessionBrief = z.object({
  id,
  number: z.int(),
  startsAt: instant,
  endsAt: instant,
  duskAt: instant.nullable(),
  darkMinutes: z.int(),
  capacity: z.int(),
  /** Held and confirmed places together. */
  taken: z.int(),
  state: z.enum(['planned', 'called-off']),
  calledOffReason: z.string().nullable(),
  registerState: z.enum(['open', 'closed']),
  coaches: z.array(coachBrief),
  areas: z.array(areaBrief.extend({ fromUnit: z.int(), toUnit: z.int() })),
})

export const clinicView = clinicFields.extend({
  id,
  slug,
  zone: z.string(),
  state: z.enum(['draft', 'published', 'withdrawn']),
  /** The recurrence in plain words: "Every Tuesday". */
  recurrence: z.string(),
  venueName: z.string(),
  coaches: z.array(coachBrief),
  sessions: z.array(sessionBrief),
  waiting: z.int(),
})

export const clinicListItem = z.object({
  id,
  slug,
  title: z.string(),
  state: z.enum(['draft', 'published', 'withdrawn']),
  sessionsHeld: z.int(),
  sessionsTotal: z.int(),
  nextStartsAt: instant.nullable(),
  firstStartsAt: instant.nullable(),
  lastStartsAt: instant.nullable(),
  capacity: z.int(),
  taken: z.int(),
  waiting: z.int(),
  coaches: z.array(coachBrief),
  runPriceMinor: amountMinor.nullable(),
  dropInPriceMinor: amountMinor.nullable(),
})

export const pageClinic = z.object({
  slug,
  title: z.string(),
  summary: z.string(),
  startsAt: instant,
  endsAt: instant,
  zone: z.string(),
  /** Sessions still to come, and of how many. */
  sessionsAhead: z.int(),
  sessionsTotal: z.int(),
  areas: z.array(z.string()),
  coaches: z.array(z.string()),
  capacity: z.int(),
  /** Places taken in the fullest session still to come, of a run; in the next one, of drop-in. */
  taken: z.int(),
  waiting: z.int(),
  saleMode: z.enum(SALE_MODES),
  payMode: z.enum(PAY_MODES),
  /** What a golfer who joins now pays for the rest of the run. */
  runPriceMinor: amountMinor.nullable(),
  dropInPriceMinor: amountMinor.nullable(),
  handicapMin: z.number().nullable(),
  handicapMax: z.number().nullable(),
  ageMin: z.int().nullable(),
  ageMax: z.int().nullable(),
})

export const academyFace = z.object({
  slug,
  name: z.string(),
  place: z.string(),
  lead: z.string(),
  address: z.string(),
  zone: z.string(),
  locale: z.string(),
  currency: z.string(),
  accent: z.string(),
  accentDusk: z.string(),
  taxMode: z.enum(['included', 'added']),
  taxName: z.string(),
  taxBasisPoints: z.int(),
  refundTiers: z.array(z.object({ noticeHours: z.int(), refundBasisPoints: z.int() })),
  waiver: z.string(),
  safeguarding: z.string(),
  duskKind: z.enum(['sunset', 'civil']),
  holdMinutes: z.int(),
  canPayAtDesk: z.boolean(),
  isPublished: z.boolean(),
})

export const pageClinicDetail = pageClinic.extend({
  id,
  about: z.string(),
  bring: z.string(),
  venue: z.object({
    name: z.string(),
    address: z.string(),
    gettingHere: z.string(),
    latitudeDeg: z.number(),
    longitudeDeg: z.number(),
  }),
  recurrence: z.string(),
  coachDetails: z.array(z.object({ name: z.string(), initials: z.string(), about: z.string() })),
  sessions: z.array(
    z.object({
      id,
      number: z.int(),
      startsAt: instant,
      endsAt: instant,
      duskAt: instant.nullable(),
      darkMinutes: z.int(),
      isPast: z.boolean(),
      state: z.enum(['planned', 'called-off']),
      areas: z.array(z.object({ name: z.string(), hasLamps: z.boolean(), isCovered: z.boolean() })),
      capacity: z.int(),
      taken: z.int(),
    }),
  ),
})

const clinicParams = z.strictObject({ clinicId: id })

export const clinicSchemas = {
  'page.read': {
    response: z.object({
      academy: academyFace,
      clinics: z.array(pageClinic),
      coaches: z.array(z.object({ name: z.string(), initials: z.string(), about: z.string() })),
      venues: z.array(z.object({ name: z.string(), address: z.string(), gettingHere: z.string() })),
    }),
  },
  'page.clinic': {
    params: z.strictObject({ clinic: slug }),
    response: z.object({ academy: academyFace, clinic: pageClinicDetail }),
  },
  'clinics.preview': {
    body: clinicFields
      .pick({
        venueId: true,
        startsOnLocal: true,
        startsAtLocal: true,
        durationMinutes: true,
        rrule: true,
        skipDates: true,
        coachIds: true,
        areas: true,
      })
      .extend({ clinicId: id.optional() }),
    response: z.object({
      recurrence: z.string(),
      dates: z.array(previewDate),
      /** Sunset for the days between the first and the last date, for the light chart. */
      light: z.array(z.object({ dayLocal: localDate, duskLocalMinutes: z.int().nullable() })),
      clockChanges: z.array(
        z.object({ dayLocal: localDate, direction: z.enum(['forward', 'back']) }),
      ),
      holidays: z.array(z.object({ dayLocal: localDate, name: z.string() })),
    }),
  },
  'clinics.list': { response: z.object({ clinics: z.array(clinicListItem) }) },
  'clinics.draft': { body: clinicFields, response: clinicView },
  'clinics.read': { params: clinicParams, response: clinicView },
  'clinics.change': { params: clinicParams, body: clinicFields, response: clinicView },
  'clinics.publish': {
    params: clinicParams,
    body: z.strictObject({ isPublished: z.boolean() }),
    response: clinicView,
  },
  'clinics.throw-away': { params: clinicParams, response: z.null() },
  'sessions.list': {
    query: z.strictObject({ from: localDate, to: localDate }),
    response: z.object({
      zone: z.string(),
      areas: z.array(areaBrief.extend({ venueName: z.string() })),
      days: z.array(z.object({ dayLocal: localDate, duskAt: instant.nullable() })),
      sessions: z.array(
        sessionBrief.extend({
          clinicId: id,
          clinicTitle: z.string(),
          /** The day and the zone of its venue, which may be others than the academy's. */
          heldOn: localDate,
          zone: z.string(),
        }),
      ),
    }),
  },
  'sessions.change': {
    params: z.strictObject({ sessionId: id }),
    body: z.strictObject({
      startsOnLocal: localDate.optional(),
      startsAtLocal: localTime.optional(),
      durationMinutes: z.int().min(15).max(600).optional(),
      coachIds: z.array(id).min(1).max(6).optional(),
      areas: z.array(areaUse).min(1).max(6).optional(),
      capacity: z.int().min(1).max(200).optional(),
    }),
    response: sessionBrief,
  },
  'sessions.call-off': {
    params: z.strictObject({ sessionId: id }),
    body: z.strictObject({ reason: line(120) }),
    response: sessionBrief,
  },
} as const
