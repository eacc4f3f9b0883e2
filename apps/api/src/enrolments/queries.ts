import { ask } from '../platform/tenancy/ask'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import { Enrolment, Place, WaitlistEntry, type EndedBecause } from './models'

export async function findEnrolment(trx: AcademyTrx, id: string): Promise<Enrolment | undefined> {
  return Enrolment.query(trx).where({ id }).first()
}

export async function lockEnrolment(trx: AcademyTrx, id: string): Promise<Enrolment | undefined> {
  return Enrolment.query(trx).where({ id }).forNoKeyUpdate().first()
}

export async function updateEnrolment(
  trx: AcademyTrx,
  id: string,
  change: Partial<Enrolment>,
): Promise<void> {
  await Enrolment.query(trx).patch(change).where({ id })
}

export async function listPlaces(trx: AcademyTrx, enrolmentId: string): Promise<Place[]> {
  return Place.query(trx).where({ enrolmentId }).orderBy('id')
}

export async function findPlace(trx: AcademyTrx, id: string): Promise<Place | undefined> {
  return Place.query(trx).where({ id }).first()
}

/** Whether a golfer has a confirmed place in a session. */
export async function hasPlaceIn(
  trx: AcademyTrx,
  { golferId, sessionId }: { golferId: string; sessionId: string },
): Promise<boolean> {
  const found = await Place.query(trx).where({ golferId, sessionId, state: 'confirmed' }).first()
  return found !== undefined
}

export interface NewEnrolment {
  id: string
  clinicId: string
  golferId: string
  takenBy: string | null
  kind: 'run' | 'session'
  state: 'held' | 'confirmed'
  isOffer: boolean
  heldUntil: Date | null
  currency: string
  netMinor: number
  taxMinor: number
  payMode: 'card' | 'desk' | 'free'
  createdAt: Date
}

export interface NewPlace {
  id: string
  sessionId: string
  netMinor: number
  taxMinor: number
}

/**
 * Writes an enrolment and its places in one statement, in which a golfer who waited for them stops
 * waiting. Who takes an offer is no longer waiting, and the offer ends another way.
 */
export async function insertEnrolment(
  trx: AcademyTrx,
  enrolment: NewEnrolment,
  places: readonly NewPlace[],
): Promise<void> {
  const { id, clinicId, golferId, takenBy, kind, state, isOffer, heldUntil } = enrolment
  const { currency, netMinor, taxMinor, payMode, createdAt } = enrolment
  await ask(trx, {
    name: 'insert-enrolment',
    text: INSERT_ENROLMENT,
    values: [
      ...[id, clinicId, golferId, takenBy, kind, state, isOffer, heldUntil],
      ...[currency, netMinor, taxMinor, payMode, createdAt],
      places.map((place) => place.id),
      places.map(({ sessionId }) => sessionId),
      places.map((place) => place.netMinor),
      places.map((place) => place.taxMinor),
    ],
  })
}

const INSERT_ENROLMENT = `
  WITH enrolment AS (
    INSERT INTO enrolments (academy_id, id, clinic_id, golfer_id, taken_by, kind, state,
      is_offer, held_until, currency, net_minor, tax_minor, pay_mode, created_at)
    VALUES (current_setting('app.academy_id')::uuid, $1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11,
      $12, $13)
    RETURNING academy_id, id, clinic_id, golfer_id, kind, state, is_offer
  ), waiting AS (
    UPDATE waitlist_entries w SET state = 'taken' FROM enrolment e
    WHERE w.academy_id = e.academy_id AND w.clinic_id = e.clinic_id
      AND w.golfer_id = e.golfer_id AND w.state = 'waiting' AND NOT e.is_offer
      AND (e.kind = 'run' OR w.session_id = ANY($15::uuid[]))
  )
  INSERT INTO places (academy_id, id, enrolment_id, session_id, golfer_id, state, net_minor,
    tax_minor)
  SELECT e.academy_id, p.id, e.id, p.session_id, e.golfer_id, e.state, p.net_minor, p.tax_minor
  FROM enrolment e, unnest($14::uuid[], $15::uuid[], $16::bigint[], $17::bigint[])
    AS p (id, session_id, net_minor, tax_minor)`

/**
 * Takes one place in each session, where there is one: the whole guard against overselling is this
 * condition. Rows are locked in id order, so that two runs cannot wait for each other; and not
 * against those who merely refer to them, since everybody who comes here has just written places.
 * Resolves to the sessions that had a place.
 */
export async function takeSeats(
  trx: AcademyTrx,
  { sessionIds, as }: { sessionIds: readonly string[]; as: 'held' | 'confirmed' },
): Promise<string[]> {
  const [only] = sessionIds
  const isOne = only !== undefined && sessionIds.length === 1
  const rows = await ask<{ id: string }>(trx, {
    name: `take-seats-${as}-${isOne ? 'in-one' : 'in-order'}`,
    text: isOne
      ? `UPDATE sessions SET ${as} = ${as} + 1
         WHERE id = $1 AND state = 'planned' AND held + confirmed < capacity RETURNING id`
      : `WITH in_order AS (
           SELECT id FROM sessions WHERE id = ANY($1) ORDER BY id FOR NO KEY UPDATE)
         UPDATE sessions s SET ${as} = ${as} + 1 FROM in_order
         WHERE s.id = in_order.id AND s.state = 'planned' AND s.held + s.confirmed < s.capacity
         RETURNING s.id`,
    values: isOne ? [only] : [[...sessionIds]],
  })
  return rows.map(({ id }) => id)
}

/**
 * Locks the seats of a whole clinic, in id order. Whoever gives seats back does this first: what is
 * then offered to those who wait is counted while nobody else can take it.
 */
export async function lockSeatsOf(trx: AcademyTrx, clinicId: string): Promise<void> {
  await trx.raw('SELECT id FROM sessions WHERE clinic_id = ? ORDER BY id FOR NO KEY UPDATE', [
    clinicId,
  ])
}

/** Gives seats back, in id order. */
export async function returnSeats(
  trx: AcademyTrx,
  { sessionIds, from }: { sessionIds: readonly string[]; from: 'held' | 'confirmed' },
): Promise<void> {
  if (sessionIds.length === 0) return
  await trx.raw(
    `WITH in_order AS (SELECT id FROM sessions WHERE id = ANY(?) ORDER BY id FOR NO KEY UPDATE)
     UPDATE sessions s SET ${from} = ${from} - 1 FROM in_order WHERE s.id = in_order.id`,
    [[...sessionIds]],
  )
}

/** Turns held seats into confirmed ones. */
export async function confirmSeats(trx: AcademyTrx, sessionIds: readonly string[]): Promise<void> {
  await trx.raw(
    `WITH in_order AS (SELECT id FROM sessions WHERE id = ANY(?) ORDER BY id FOR NO KEY UPDATE)
     UPDATE sessions s SET held = held - 1, confirmed = confirmed + 1
     FROM in_order WHERE s.id = in_order.id`,
    [[...sessionIds]],
  )
}

export async function setPlacesState(
  trx: AcademyTrx,
  placeIds: readonly string[],
  change: { state: 'confirmed' } | { state: 'cancelled'; endedBecause: EndedBecause },
): Promise<void> {
  const endedBecause = change.state === 'cancelled' ? change.endedBecause : null
  await Place.query(trx)
    .patch({ state: change.state, endedBecause })
    .whereIn('id', [...placeIds])
}

/** The newest active enrolment of a golfer in any of these sessions. */
export async function findActiveEnrolment(
  trx: AcademyTrx,
  { golferId, sessionIds }: { golferId: string; sessionIds: readonly string[] },
): Promise<Enrolment | undefined> {
  return Enrolment.query(trx)
    .whereIn(
      'id',
      Place.query(trx)
        .select('enrolmentId')
        .where({ golferId })
        .whereIn('sessionId', [...sessionIds])
        .whereNot('state', 'cancelled'),
    )
    .orderBy('createdAt', 'desc')
    .first()
}

/** Writes an entry; a golfer who waits or has been offered the place keeps the one they have. */
export async function insertWaitlistEntry(
  trx: AcademyTrx,
  row: Partial<WaitlistEntry>,
): Promise<void> {
  await WaitlistEntry.query(trx).insert(row).onConflict().ignore()
}

export async function findWaitlistEntry(
  trx: AcademyTrx,
  id: string,
): Promise<WaitlistEntry | undefined> {
  return WaitlistEntry.query(trx).where({ id }).first()
}

/** Everybody who waits for a clinic, first come first, locked. */
export async function lockQueue(trx: AcademyTrx, clinicId: string): Promise<WaitlistEntry[]> {
  return WaitlistEntry.query(trx)
    .where({ clinicId, state: 'waiting' })
    .orderBy(['joinedAt', 'id'])
    .forUpdate()
}

export async function updateWaitlistEntry(
  trx: AcademyTrx,
  id: string,
  change: Partial<WaitlistEntry>,
): Promise<void> {
  await WaitlistEntry.query(trx).patch(change).where({ id })
}

/** Stops somebody's waiting; false when they do not wait any more. */
export async function endWaiting(trx: AcademyTrx, id: string): Promise<boolean> {
  const change = { state: 'left' } as const
  return (await WaitlistEntry.query(trx).patch(change).where({ id, state: 'waiting' })) === 1
}

/** What became of an offer: its entry follows the enrolment. */
export async function settleOffer(
  trx: AcademyTrx,
  { enrolmentId, state }: { enrolmentId: string; state: 'taken' | 'passed' },
): Promise<void> {
  await WaitlistEntry.query(trx).patch({ state }).where({ enrolmentId, state: 'offered' })
}

export interface WaitlistRow extends WaitlistEntry {
  clinicSlug: string
  clinicTitle: string
  sessionStartsAt: Date | null
  golferName: string
  position: number
  offeredUntil: Date | null
}

const WAITS_BY = {
  accountId: 'w.account_id',
  clinicId: 'w.clinic_id',
  golferId: 'w.golfer_id',
} as const

/** Waiting and offered entries, each with its place in the queue. */
export async function listWaitlist(
  trx: AcademyTrx,
  by: { accountId: string } | { clinicId: string } | { golferId: string },
): Promise<WaitlistRow[]> {
  const [column, value] = Object.entries(by)[0] as [keyof typeof WAITS_BY, string]
  const { rows } = await trx.raw<{ rows: WaitlistRow[] }>(
    `SELECT w.*, c.slug AS clinic_slug, c.title AS clinic_title, s.starts_at AS session_starts_at,
       g.name AS golfer_name, e.held_until AS offered_until,
       (SELECT count(*) FROM waitlist_entries q WHERE q.clinic_id = w.clinic_id
          AND q.session_id IS NOT DISTINCT FROM w.session_id AND q.state = 'waiting'
          AND (q.joined_at, q.id) <= (w.joined_at, w.id)) AS position
     FROM waitlist_entries w
     JOIN clinics c ON c.academy_id = w.academy_id AND c.id = w.clinic_id
     JOIN golfers g ON g.academy_id = w.academy_id AND g.id = w.golfer_id
     LEFT JOIN sessions s ON s.academy_id = w.academy_id AND s.id = w.session_id
     LEFT JOIN enrolments e ON e.academy_id = w.academy_id AND e.id = w.enrolment_id
     WHERE ${WAITS_BY[column]} = ? AND w.state IN ('waiting', 'offered')
     ORDER BY w.joined_at, w.id`,
    [value],
  )
  return rows
}

export interface EnrolmentRow extends Enrolment {
  clinicSlug: string
  clinicTitle: string
  clinicBring: string
  zone: string
  venueName: string
  golferName: string
  golferAccountId: string | null
}

/** Enrolments with what is said of their clinic and golfer, the newest first. */
export async function listEnrolments(
  trx: AcademyTrx,
  ids: readonly string[],
): Promise<EnrolmentRow[]> {
  return Enrolment.query(trx)
    .join('clinics', (join) =>
      join.on('clinics.academyId', 'enrolments.academyId').on('clinics.id', 'enrolments.clinicId'),
    )
    .join('golfers', (join) =>
      join.on('golfers.academyId', 'enrolments.academyId').on('golfers.id', 'enrolments.golferId'),
    )
    .join('venues', (join) =>
      join.on('venues.academyId', 'clinics.academyId').on('venues.id', 'clinics.venueId'),
    )
    .select(
      'enrolments.*',
      'clinics.slug as clinicSlug',
      'clinics.title as clinicTitle',
      'clinics.bring as clinicBring',
      'clinics.zone as zone',
      'venues.name as venueName',
      'golfers.name as golferName',
      'golfers.accountId as golferAccountId',
    )
    .whereIn('enrolments.id', [...ids])
    .orderBy('enrolments.createdAt', 'desc')
    .castTo<EnrolmentRow[]>()
}

export interface PlaceRow extends Place {
  number: number
  startsAt: Date
  endsAt: Date
  sessionState: 'planned' | 'called-off'
  calendarSequence: number
  mark: 'present' | 'late' | 'absent' | 'excused' | null
  areas: string[]
}

export async function listPlaceRows(
  trx: AcademyTrx,
  enrolmentIds: readonly string[],
): Promise<PlaceRow[]> {
  const { rows } = await trx.raw<{ rows: PlaceRow[] }>(
    `SELECT p.*, s.number, s.starts_at, s.ends_at, s.state AS session_state,
       s.calendar_sequence, m.mark,
       (SELECT coalesce(json_agg(a.name ORDER BY sa.position), '[]') FROM session_areas sa
          JOIN areas a ON a.academy_id = sa.academy_id AND a.id = sa.area_id
          WHERE sa.academy_id = p.academy_id AND sa.session_id = p.session_id) AS areas
     FROM places p
     JOIN sessions s ON s.academy_id = p.academy_id AND s.id = p.session_id
     LEFT JOIN marks m ON m.academy_id = p.academy_id AND m.place_id = p.id
     WHERE p.enrolment_id = ANY(?) ORDER BY s.number`,
    [[...enrolmentIds]],
  )
  return rows
}

/** The enrolments with a confirmed place in a session, by id. */
export async function listEnrolmentsIn(trx: AcademyTrx, sessionId: string): Promise<string[]> {
  const rows = await Place.query(trx)
    .where({ sessionId, state: 'confirmed' })
    .distinct('enrolmentId')
    .orderBy('enrolmentId')
  return rows.map(({ enrolmentId }) => enrolmentId)
}

/** Confirmed places of a session, locked. */
export async function lockConfirmedPlaces(trx: AcademyTrx, sessionId: string): Promise<Place[]> {
  return Place.query(trx).where({ sessionId, state: 'confirmed' }).orderBy('id').forUpdate()
}
