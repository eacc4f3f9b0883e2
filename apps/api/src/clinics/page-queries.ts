import { isoInstant as iso } from '../platform/db/iso-instant'
import type { Question } from '../platform/tenancy/ask'

/** The academy of the transaction as the public sees it. */
export interface FaceRow {
  slug: string
  name: string
  place: string
  lead: string
  address: string
  zone: string
  locale: string
  currency: string
  accent: string
  accentDusk: string
  taxMode: 'included' | 'added'
  taxName: string
  taxBasisPoints: number
  refundTiers: { noticeHours: number; refundBasisPoints: number }[]
  waiver: string
  safeguarding: string
  duskKind: 'sunset' | 'civil'
  holdMinutes: number
  canPayAtDesk: boolean
  isPublished: boolean
}

export interface PageClinicRow {
  slug: string
  title: string
  summary: string
  startsAt: string
  endsAt: string
  zone: string
  sessionsAhead: number
  /** The numbers in the run of the sessions still to come. */
  numbersAhead: number[]
  sessionsTotal: number
  areas: string[]
  coaches: string[]
  capacity: number
  /** In the fullest session still to come, of a run; in the next one, of drop-in. */
  taken: number
  waiting: number
  saleMode: 'run' | 'drop-in' | 'both'
  payMode: 'card' | 'desk' | 'free'
  runPriceMinor: number | null
  dropInPriceMinor: number | null
  handicapMin: number | null
  handicapMax: number | null
  ageMin: number | null
  ageMax: number | null
}

export interface PageRow {
  academy: FaceRow | null
  clinics: PageClinicRow[]
  coaches: { name: string; initials: string; about: string }[]
  venues: { name: string; address: string; gettingHere: string }[]
}

const FACE = `
  SELECT json_build_object(
    'slug', slug, 'name', name, 'place', place, 'lead', lead, 'address', address, 'zone', zone,
    'locale', locale, 'currency', currency, 'accent', accent, 'accentDusk', accent_dusk,
    'taxMode', tax_mode, 'taxName', tax_name, 'taxBasisPoints', tax_basis_points,
    'refundTiers', refund_tiers, 'waiver', waiver, 'safeguarding', safeguarding,
    'duskKind', dusk_kind, 'holdMinutes', hold_minutes, 'canPayAtDesk', can_pay_at_desk,
    'isPublished', published_at IS NOT NULL)
  FROM academies`

const isAhead = "s.state = 'planned' AND s.starts_at > $1"

/**
 * Published clinics with a session still to come: what the next one and the fullest one say, each
 * found through the clinic's own index entries, which costs the same beside a thousand academies.
 */
const CLINICS = `
  SELECT next.starts_at, c.slug, json_build_object(
    'slug', c.slug, 'title', c.title, 'summary', c.summary,
    'startsAt', ${iso('next.starts_at')}, 'endsAt', ${iso('next.ends_at')}, 'zone', c.zone,
    'sessionsAhead', run.sessions_ahead, 'sessionsTotal', run.sessions_total,
    'numbersAhead', run.numbers_ahead,
    'areas', (SELECT coalesce(json_agg(ar.name ORDER BY sa.position), '[]') FROM session_areas sa
      JOIN areas ar ON ar.academy_id = sa.academy_id AND ar.id = sa.area_id
      WHERE sa.academy_id = c.academy_id AND sa.session_id = next.id),
    'coaches', (SELECT coalesce(json_agg(co.name ORDER BY sc.position), '[]')
      FROM session_coaches sc
      JOIN coaches co ON co.academy_id = sc.academy_id AND co.id = sc.coach_id
      WHERE sc.academy_id = c.academy_id AND sc.session_id = next.id),
    'capacity', fullest.capacity,
    'taken', CASE WHEN c.sale_mode = 'drop-in' THEN next.taken ELSE fullest.taken END,
    'waiting', (SELECT count(*) FROM waitlist_entries w
      WHERE w.academy_id = c.academy_id AND w.clinic_id = c.id AND w.state = 'waiting'),
    'saleMode', c.sale_mode, 'payMode', c.pay_mode, 'runPriceMinor', c.run_price_minor,
    'dropInPriceMinor', c.drop_in_price_minor, 'handicapMin', c.handicap_min,
    'handicapMax', c.handicap_max, 'ageMin', c.age_min, 'ageMax', c.age_max) AS shown
  FROM clinics c
  CROSS JOIN LATERAL (
    SELECT id, starts_at, ends_at, held + confirmed AS taken FROM sessions s
    WHERE s.academy_id = c.academy_id AND s.clinic_id = c.id AND ${isAhead}
    ORDER BY starts_at LIMIT 1) next
  CROSS JOIN LATERAL (
    SELECT capacity, held + confirmed AS taken FROM sessions s
    WHERE s.academy_id = c.academy_id AND s.clinic_id = c.id AND ${isAhead}
    ORDER BY held + confirmed DESC LIMIT 1) fullest
  CROSS JOIN LATERAL (
    SELECT count(*) AS sessions_total, count(*) FILTER (WHERE ${isAhead}) AS sessions_ahead,
      array_agg(s.number) FILTER (WHERE ${isAhead}) AS numbers_ahead
    FROM sessions s WHERE s.academy_id = c.academy_id AND s.clinic_id = c.id) run
  WHERE c.state = 'published'`

/** The whole public page in one question: what is on it at this moment. */
export const pageAt = (now: Date): Question => ({
  name: 'public-page',
  text: `
    SELECT (${FACE}) AS academy,
      (SELECT coalesce(json_agg(p.shown ORDER BY p.starts_at, p.slug), '[]')
         FROM (${CLINICS}) p) AS clinics,
      (SELECT coalesce(json_agg(json_build_object(
           'name', name, 'initials', initials, 'about', about) ORDER BY created_at), '[]')
         FROM coaches) AS coaches,
      (SELECT coalesce(json_agg(json_build_object(
           'name', name, 'address', address, 'gettingHere', getting_here) ORDER BY created_at), '[]')
         FROM venues) AS venues`,
  values: [now],
})

export interface ClinicDetailRow {
  id: string
  slug: string
  title: string
  summary: string
  about: string
  bring: string
  zone: string
  rrule: string
  startsOnLocal: string
  capacity: number
  saleMode: 'run' | 'drop-in' | 'both'
  payMode: 'card' | 'desk' | 'free'
  runPriceMinor: number | null
  dropInPriceMinor: number | null
  handicapMin: number | null
  handicapMax: number | null
  ageMin: number | null
  ageMax: number | null
  waiting: number
  venue: {
    name: string
    address: string
    gettingHere: string
    latitudeDeg: number
    longitudeDeg: number
  }
  coachDetails: { name: string; initials: string; about: string }[]
  sessions: {
    id: string
    number: number
    startsAt: string
    endsAt: string
    duskAt: string | null
    state: 'planned' | 'called-off'
    areas: { name: string; hasLamps: boolean; isCovered: boolean }[]
    capacity: number
    taken: number
  }[]
}

export interface ClinicPageRow {
  academy: FaceRow | null
  clinic: ClinicDetailRow | null
}

/** One clinic on the page, with every session and the places left in it at this moment. */
export const clinicPageOf = (slug: string): Question => ({
  name: 'public-clinic-page',
  text: `
    SELECT (${FACE}) AS academy, (
       SELECT json_build_object(
         'id', c.id, 'slug', c.slug, 'title', c.title, 'summary', c.summary, 'about', c.about,
         'bring', c.bring, 'zone', c.zone, 'rrule', c.rrule, 'startsOnLocal', c.starts_on_local,
         'capacity', c.capacity, 'saleMode', c.sale_mode, 'payMode', c.pay_mode,
         'runPriceMinor', c.run_price_minor, 'dropInPriceMinor', c.drop_in_price_minor,
         'handicapMin', c.handicap_min, 'handicapMax', c.handicap_max, 'ageMin', c.age_min,
         'ageMax', c.age_max,
         'waiting', (SELECT count(*) FROM waitlist_entries w
            WHERE w.clinic_id = c.id AND w.state = 'waiting'),
         'venue', (SELECT json_build_object('name', v.name, 'address', v.address,
            'gettingHere', v.getting_here, 'latitudeDeg', v.latitude_deg,
            'longitudeDeg', v.longitude_deg) FROM venues v WHERE v.id = c.venue_id),
         'coachDetails', (SELECT coalesce(json_agg(json_build_object('name', co.name,
            'initials', co.initials, 'about', co.about) ORDER BY cc.position), '[]')
            FROM clinic_coaches cc JOIN coaches co ON co.id = cc.coach_id
            WHERE cc.clinic_id = c.id),
         'sessions', (SELECT coalesce(json_agg(json_build_object(
            'id', s.id, 'number', s.number, 'startsAt', ${iso('s.starts_at')},
            'endsAt', ${iso('s.ends_at')}, 'duskAt', ${iso('s.dusk_at')}, 'state', s.state,
            'capacity', s.capacity, 'taken', s.held + s.confirmed,
            'areas', (SELECT coalesce(json_agg(json_build_object('name', ar.name,
               'hasLamps', ar.has_lamps, 'isCovered', ar.is_covered) ORDER BY sa.position), '[]')
               FROM session_areas sa JOIN areas ar ON ar.id = sa.area_id
               WHERE sa.session_id = s.id)) ORDER BY s.number), '[]')
            FROM sessions s WHERE s.clinic_id = c.id))
       FROM clinics c WHERE c.slug = $1 AND c.state = 'published') AS clinic`,
  values: [slug],
})
