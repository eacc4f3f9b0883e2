import type { AcademyTrx, PlainTrx } from '../platform/tenancy/transaction'
import { CreditChange, Order, OwedPlace, Payment, Refund } from './models'

/** The order that asks, or asked, for an enrolment's money; void ones are left out. */
export async function lockLiveOrder(
  trx: AcademyTrx,
  enrolmentId: string,
): Promise<Order | undefined> {
  return Order.query(trx).where({ enrolmentId }).whereNot({ state: 'void' }).forUpdate().first()
}

export async function findOrder(trx: AcademyTrx, id: string): Promise<Order | undefined> {
  return Order.query(trx).where({ id }).first()
}

export async function lockOrder(trx: AcademyTrx, id: string): Promise<Order | undefined> {
  return Order.query(trx).where({ id }).forUpdate().first()
}

export async function insertOrder(trx: AcademyTrx, row: Partial<Order>): Promise<Order> {
  await Order.query(trx).insert(row)
  return Order.fromDatabaseJson({ ...row })
}

export async function updateOrder(
  trx: AcademyTrx,
  id: string,
  change: Partial<Order>,
): Promise<void> {
  await Order.query(trx).patch(change).where({ id })
}

/** Resolves to false when this payment of the provider's was written down before. */
export async function insertPayment(trx: AcademyTrx, row: Partial<Payment>): Promise<boolean> {
  await Payment.query(trx).insert(row).onConflict(['academy_id', 'provider_payment']).ignore()
  // The answer of an insert that met a conflict is the row that was given, as if it were there.
  return (await Payment.query(trx).where({ id: row.id }).resultSize()) === 1
}

/** The payments that an order stands on; one that found its place gone, or paid, goes back whole. */
export async function listPaymentsOf(trx: AcademyTrx, orderId: string): Promise<Payment[]> {
  const givenBack = Refund.query(trx).select('sourceId').where({ reason: 'late-payment' })
  return Payment.query(trx)
    .where({ orderId })
    .whereNotIn('id', givenBack)
    .orderBy(['takenAt', 'id'])
}

export async function findPayment(trx: AcademyTrx, id: string): Promise<Payment | undefined> {
  return Payment.query(trx).where({ id }).first()
}

/** Resolves to false when the same thing was refunded before. */
export async function insertRefund(trx: AcademyTrx, row: Partial<Refund>): Promise<boolean> {
  const had = await Refund.query(trx)
    .where({ reason: row.reason, sourceId: row.sourceId })
    .resultSize()
  if (had > 0) return false
  await Refund.query(trx).insert(row)
  return true
}

export async function lockRefund(trx: AcademyTrx, id: string): Promise<Refund | undefined> {
  return Refund.query(trx).where({ id }).forUpdate().first()
}

export async function updateRefund(
  trx: AcademyTrx,
  id: string,
  change: Partial<Refund>,
): Promise<void> {
  await Refund.query(trx).patch(change).where({ id })
}

export async function insertOwedPlace(trx: AcademyTrx, row: Partial<OwedPlace>): Promise<void> {
  await OwedPlace.query(trx).insert(row).onConflict(['academy_id', 'place_id']).ignore()
}

export async function lockOwedPlace(
  trx: AcademyTrx,
  placeId: string,
): Promise<OwedPlace | undefined> {
  return OwedPlace.query(trx).where({ placeId }).forUpdate().first()
}

export async function updateOwedPlace(
  trx: AcademyTrx,
  placeId: string,
  change: Partial<OwedPlace>,
): Promise<void> {
  await OwedPlace.query(trx).patch(change).where({ placeId })
}

export async function insertCredit(trx: AcademyTrx, row: Partial<CreditChange>): Promise<void> {
  await CreditChange.query(trx)
    .insert(row)
    .onConflict(['academy_id', 'source_type', 'source_id'])
    .ignore()
}

export async function readCreditOfGolfer(trx: AcademyTrx, golferId: string): Promise<number> {
  const { rows } = await trx.raw<{ rows: { sum: number }[] }>(
    `SELECT coalesce(sum(amount_minor), 0)::bigint AS sum FROM credit_changes WHERE golfer_id = ?`,
    [golferId],
  )
  return rows[0]?.sum ?? 0
}

/** Credit of a person and those they look after, together. */
export async function readCreditOfAccount(trx: AcademyTrx, accountId: string): Promise<number> {
  const { rows } = await trx.raw<{ rows: { sum: number }[] }>(
    `SELECT coalesce(sum(c.amount_minor), 0)::bigint AS sum FROM credit_changes c
     JOIN golfers g ON g.academy_id = c.academy_id AND g.id = c.golfer_id
     WHERE g.account_id = :accountId OR g.guardian_account_id = :accountId`,
    { accountId },
  )
  return rows[0]?.sum ?? 0
}

export interface SessionPlaceRow {
  placeId: string
  enrolmentId: string
  clinicId: string
  sessionId: string
  heldOn: string
  netMinor: number
  taxMinor: number
  mark: 'present' | 'late' | 'absent' | 'excused' | null
}

/** Confirmed places of a session with their share of the price and their mark. */
export async function listSessionPlaces(
  trx: AcademyTrx,
  sessionId: string,
): Promise<SessionPlaceRow[]> {
  const { rows } = await trx.raw<{ rows: SessionPlaceRow[] }>(
    `SELECT p.id AS place_id, p.enrolment_id, s.clinic_id, s.id AS session_id, s.held_on,
       p.net_minor, p.tax_minor, m.mark
     FROM places p
     JOIN sessions s ON s.academy_id = p.academy_id AND s.id = p.session_id
     LEFT JOIN marks m ON m.academy_id = p.academy_id AND m.place_id = p.id
     WHERE p.session_id = ? AND p.state = 'confirmed' ORDER BY p.id`,
    [sessionId],
  )
  return rows
}

export interface EnrolmentPlaceRow {
  placeId: string
  clinicId: string
  sessionId: string
  heldOn: string
  startsAt: Date
  number: number
  sessionState: 'planned' | 'called-off'
  state: 'held' | 'confirmed' | 'cancelled'
  netMinor: number
  taxMinor: number
}

/** An enrolment's places with the day and time of each. */
export async function listEnrolmentPlaces(
  trx: AcademyTrx,
  enrolmentId: string,
): Promise<EnrolmentPlaceRow[]> {
  const { rows } = await trx.raw<{ rows: EnrolmentPlaceRow[] }>(
    `SELECT p.id AS place_id, s.clinic_id, s.id AS session_id, s.held_on, s.starts_at, s.number,
       s.state AS session_state, p.state, p.net_minor, p.tax_minor
     FROM places p JOIN sessions s ON s.academy_id = p.academy_id AND s.id = p.session_id
     WHERE p.enrolment_id = ? ORDER BY s.number`,
    [enrolmentId],
  )
  return rows
}

/** What of a session is still deferred, by the day it is deferred to. */
export async function listDeferredDays(
  trx: AcademyTrx,
  sessionId: string,
): Promise<{ heldOn: string; clinicId: string; netMinor: number }[]> {
  const { rows } = await trx.raw<{
    rows: { heldOn: string; clinicId: string; netMinor: number }[]
  }>(
    `SELECT held_on, clinic_id, -sum(amount_minor)::bigint AS net_minor FROM entries
     WHERE account_code = 'deferred-clinics' AND session_id = ?
     GROUP BY held_on, clinic_id HAVING sum(amount_minor) <> 0`,
    [sessionId],
  )
  return rows
}

/** Writes a delivery down. Resolves to false for one that came before. */
export async function insertProviderEvent(
  trx: PlainTrx,
  row: { eventId: string; type: string; accountRef: string | null; receivedAt: Date },
): Promise<boolean> {
  const written = await trx('providerEvents')
    .insert({ provider: 'payments', ...row })
    .onConflict(['provider', 'event_id'])
    .ignore()
    .returning('event_id')
  return written.length === 1
}
