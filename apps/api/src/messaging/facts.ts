import { formatMoney, toCurrencyCode } from '@marram/money'
import { formatSessionTime } from '@marram/schedule/format'
import { readAcademy, type Academy } from '../academies/academies'
import { findClinic, type Clinic } from '../clinics/clinics'
import {
  listEnrolments,
  listPlaceRows,
  type EnrolmentRow,
  type PlaceRow,
} from '../enrolments/enrolments'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import { findVenue, type Venue } from '../venues/venues'
import { findAddressee, type Addressee } from './queries'

/** Everything that a mail about an enrolment may speak of. */
export interface EnrolmentFacts {
  academy: Academy
  clinic: Clinic
  venue: Venue
  enrolment: EnrolmentRow
  places: PlaceRow[]
  addressee: Addressee
  /** How often any of its sessions was changed or called off. */
  changes: number
}

/** Null when there is nobody to write to. */
export async function readEnrolmentFacts(
  trx: AcademyTrx,
  enrolmentId: string,
): Promise<EnrolmentFacts | null> {
  const [enrolment] = await listEnrolments(trx, [enrolmentId])
  if (!enrolment) return null
  const addressee = await findAddressee(trx, enrolment.golferId)
  const clinic = await findClinic(trx, enrolment.clinicId)
  const venue = clinic && (await findVenue(trx, clinic.venueId))
  if (!addressee || !clinic || !venue) return null
  const places = await listPlaceRows(trx, [enrolmentId])
  const changes = places.reduce((sum, { calendarSequence }) => sum + calendarSequence, 0)
  return { academy: await readAcademy(trx), clinic, venue, enrolment, places, addressee, changes }
}

export function moneyText(academy: Academy, amountMinor: number): string {
  const currency = toCurrencyCode(academy.currency)
  return formatMoney({ amountMinor, currency }, { locale: academy.locale })
}

export function timeText(
  { academy, clinic }: Pick<EnrolmentFacts, 'academy' | 'clinic'>,
  session: { startsAt: Date; endsAt: Date },
): string {
  const { startsAt, endsAt } = session
  return formatSessionTime({ startsAt, endsAt, zone: clinic.zone, locale: academy.locale })
}
