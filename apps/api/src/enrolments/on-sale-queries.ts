import type { Clinic } from '../clinics/clinics'
import type { Academy } from '../academies/academies'
import type { Golfer } from '../golfers/golfers'
import { invariant } from '../platform/invariant'
import { ask } from '../platform/tenancy/ask'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import type { Enrolment } from './models'

/** A session as far as selling a place in it goes. */
export interface SessionOnSale {
  id: string
  number: number
  startsAt: Date
  state: 'planned' | 'called-off'
  capacity: number
  held: number
  confirmed: number
}

export type AcademyOnSale = Pick<
  Academy,
  'academyId' | 'currency' | 'taxMode' | 'taxBasisPoints' | 'waiver' | 'holdMinutes' | 'offerHours'
> & { isOpen: boolean }

export type ClinicOnSale = Pick<
  Clinic,
  | 'id'
  | 'state'
  | 'saleMode'
  | 'payMode'
  | 'runPriceMinor'
  | 'dropInPriceMinor'
  | 'zone'
  | 'handicapMin'
  | 'handicapMax'
  | 'ageMin'
  | 'ageMax'
>

export interface OfferRow {
  academy: AcademyOnSale
  clinic: ClinicOnSale
  /** In order of number. */
  sessions: SessionOnSale[]
}

const ACADEMY = `json_build_object(
  'academyId', a.academy_id, 'currency', a.currency, 'taxMode', a.tax_mode,
  'taxBasisPoints', a.tax_basis_points, 'waiver', a.waiver, 'holdMinutes', a.hold_minutes,
  'offerHours', a.offer_hours, 'isOpen', a.published_at IS NOT NULL)`

const CLINIC = `json_build_object(
  'id', c.id, 'state', c.state, 'saleMode', c.sale_mode, 'payMode', c.pay_mode,
  'runPriceMinor', c.run_price_minor, 'dropInPriceMinor', c.drop_in_price_minor, 'zone', c.zone,
  'handicapMin', c.handicap_min, 'handicapMax', c.handicap_max, 'ageMin', c.age_min,
  'ageMax', c.age_max)`

const SESSION = `json_build_object(
  'id', s.id, 'number', s.number, 'startsAt', s.starts_at, 'state', s.state,
  'capacity', s.capacity, 'held', s.held, 'confirmed', s.confirmed)`

/** A clinic with what selling it needs of its academy and its sessions, in one question. */
export async function readOffer(trx: AcademyTrx, clinicId: string): Promise<OfferRow | undefined> {
  const [row] = await ask<OfferRow>(trx, {
    name: 'offer-of-clinic',
    text: `
      SELECT ${ACADEMY} AS academy, ${CLINIC} AS clinic,
        (SELECT coalesce(json_agg(${SESSION} ORDER BY s.number), '[]') FROM sessions s
           WHERE s.academy_id = c.academy_id AND s.clinic_id = c.id) AS sessions
      FROM clinics c JOIN academies a ON a.academy_id = c.academy_id WHERE c.id = $1`,
    values: [clinicId],
  })
  // JSON has no dates.
  const dated = row?.sessions.map((s) => ({ ...s, startsAt: new Date(s.startsAt) }))
  return row && dated && { ...row, sessions: dated }
}

export type GolferToPlace = Pick<
  Golfer,
  'id' | 'name' | 'accountId' | 'guardianAccountId' | 'bornOn' | 'handicap'
>

export type ActiveEnrolment = Pick<Enrolment, 'id' | 'state' | 'takenBy' | 'kind'> & {
  sessionIds: string[]
}

export interface Standing {
  /** The person is a golfer of this academy already. */
  isMember: boolean
  golfer: GolferToPlace | null
  /** What the golfer has in this clinic already, the newest first. */
  active: ActiveEnrolment[]
}

/** How a person stands to a clinic: through themselves, or through a golfer whom they name. */
export async function readStanding(
  trx: AcademyTrx,
  of: { accountId: string; golferId: string | null; clinicId: string },
): Promise<Standing> {
  const isNamed = of.golferId !== null
  const [row] = await ask<Standing>(trx, {
    name: isNamed ? 'standing-of-golfer' : 'standing-of-person',
    text: `
      WITH golfer AS (
        SELECT * FROM golfers WHERE ${isNamed ? 'id = $3' : 'account_id = $1'})
      SELECT
        EXISTS (SELECT 1 FROM memberships
          WHERE account_id = $1 AND role = 'golfer') AS "isMember",
        (SELECT json_build_object('id', id, 'name', name, 'accountId', account_id,
           'guardianAccountId', guardian_account_id, 'bornOn', born_on, 'handicap', handicap)
           FROM golfer) AS golfer,
        (SELECT coalesce(json_agg(json_build_object('id', e.id, 'state', e.state,
             'takenBy', e.taken_by, 'kind', e.kind,
             'sessionIds', (SELECT coalesce(json_agg(p.session_id), '[]') FROM places p
               WHERE p.academy_id = e.academy_id AND p.enrolment_id = e.id
                 AND p.state <> 'cancelled')) ORDER BY e.created_at DESC), '[]')
           FROM golfer g JOIN enrolments e ON e.academy_id = g.academy_id AND e.golfer_id = g.id
           WHERE e.clinic_id = $2 AND e.state <> 'cancelled') AS active`,
    values: [of.accountId, of.clinicId, ...(isNamed ? [of.golferId] : [])],
  })
  invariant(row, 'a standing is one row, whatever is in it')
  return row
}
