import type { AcademyTrx } from '../platform/tenancy/transaction'
import { MarkChange, MarkRow, type Mark } from './models'

export async function setMark(trx: AcademyTrx, row: Partial<MarkRow>): Promise<void> {
  await MarkRow.query(trx)
    .insert(row)
    .onConflict(['academy_id', 'place_id'])
    .merge(['mark', 'marked_by', 'marked_at', 'pressed_at'])
}

export async function removeMark(trx: AcademyTrx, placeId: string): Promise<void> {
  await MarkRow.query(trx).delete().where({ placeId })
}

export async function insertMarkChange(trx: AcademyTrx, row: Partial<MarkChange>): Promise<void> {
  await MarkChange.query(trx).insert(row)
}

/** When a place's newest press so far was made, by the phone's clock but no later than ours. */
export async function findLastPress(trx: AcademyTrx, placeId: string): Promise<Date | null> {
  const { rows } = await trx.raw<{ rows: { pressedAt: Date | null }[] }>(
    'SELECT max(least(pressed_at, marked_at)) AS pressed_at FROM mark_history WHERE place_id = ?',
    [placeId],
  )
  return rows[0]?.pressedAt ?? null
}

export interface RowOfRegister {
  placeId: string
  sessionId: string
  golferId: string
  name: string
  mark: Mark | null
  markedBy: string | null
  markedAt: Date | null
  handicap: number | null
  hand: 'right' | 'left'
  bornOn: string | null
  guardianAccountId: string | null
  notes: string
  lateBefore: number
  joinedAtNumber: number
  isUnpaid: boolean
}

/** The rows of registers: who has a confirmed place, in order of family name as written. */
export async function listRegisterRows(
  trx: AcademyTrx,
  sessionIds: readonly string[],
): Promise<RowOfRegister[]> {
  const { rows } = await trx.raw<{ rows: RowOfRegister[] }>(
    `SELECT p.id AS place_id, p.session_id, g.id AS golfer_id, g.name, m.mark,
       a.name AS marked_by, m.marked_at, g.handicap, g.hand, g.born_on,
       g.guardian_account_id, g.notes,
       (SELECT count(*) FROM places q
          JOIN sessions t ON t.academy_id = q.academy_id AND t.id = q.session_id
          JOIN marks n ON n.academy_id = q.academy_id AND n.place_id = q.id
          WHERE q.golfer_id = p.golfer_id AND t.clinic_id = s.clinic_id
            AND t.starts_at < s.starts_at AND n.mark = 'late') AS late_before,
       (SELECT min(t.number) FROM places q
          JOIN sessions t ON t.academy_id = q.academy_id AND t.id = q.session_id
          WHERE q.enrolment_id = p.enrolment_id) AS joined_at_number,
       EXISTS (SELECT 1 FROM owed_at_desk o WHERE o.academy_id = p.academy_id
          AND o.enrolment_id = p.enrolment_id AND o.owed_minor > 0) AS is_unpaid
     FROM places p
     JOIN sessions s ON s.academy_id = p.academy_id AND s.id = p.session_id
     JOIN golfers g ON g.academy_id = p.academy_id AND g.id = p.golfer_id
     LEFT JOIN marks m ON m.academy_id = p.academy_id AND m.place_id = p.id
     LEFT JOIN accounts a ON a.id = m.marked_by
     WHERE p.session_id = ANY(?) AND p.state = 'confirmed'
     ORDER BY g.name, g.id`,
    [[...sessionIds]],
  )
  return rows
}

export interface RegisterHead {
  id: string
  clinicTitle: string
  sessionsTotal: number
  zone: string
  closedBy: string | null
}

export async function listRegisterHeads(
  trx: AcademyTrx,
  sessionIds: readonly string[],
): Promise<Map<string, RegisterHead>> {
  const { rows } = await trx.raw<{ rows: RegisterHead[] }>(
    `SELECT s.id, c.title AS clinic_title, c.zone, a.name AS closed_by,
       (SELECT count(*) FROM sessions t WHERE t.clinic_id = s.clinic_id) AS sessions_total
     FROM sessions s
     JOIN clinics c ON c.academy_id = s.academy_id AND c.id = s.clinic_id
     LEFT JOIN accounts a ON a.id = s.register_closed_by
     WHERE s.id = ANY(?)`,
    [[...sessionIds]],
  )
  return new Map(rows.map((row) => [row.id, row]))
}

export interface CardRow {
  golferId: string
  name: string
  handicap: number | null
  hand: 'right' | 'left'
  enrolmentId: string
  sessionId: string
  mark: Mark | null
}

/** Every confirmed place of a clinic, golfer by golfer, for its card. */
export async function listCardRows(trx: AcademyTrx, clinicId: string): Promise<CardRow[]> {
  const { rows } = await trx.raw<{ rows: CardRow[] }>(
    `SELECT g.id AS golfer_id, g.name, g.handicap, g.hand, p.enrolment_id, p.session_id, m.mark
     FROM places p
     JOIN sessions s ON s.academy_id = p.academy_id AND s.id = p.session_id
     JOIN golfers g ON g.academy_id = p.academy_id AND g.id = p.golfer_id
     LEFT JOIN marks m ON m.academy_id = p.academy_id AND m.place_id = p.id
     WHERE s.clinic_id = ? AND (p.state = 'confirmed' OR p.ended_because = 'called-off')
     ORDER BY g.name, g.id, s.number`,
    [clinicId],
  )
  return rows
}

export interface CardMoney {
  paidMinor: number
  taxMinor: number
  earnedMinor: number
  toEarnMinor: number
}

/** What the ledger holds of a clinic, in the sign a reader expects. */
export async function readCardMoney(trx: AcademyTrx, clinicId: string): Promise<CardMoney> {
  const { rows } = await trx.raw<{ rows: CardMoney[] }>(
    `SELECT
       coalesce(-sum(amount_minor) FILTER (WHERE account_code = 'tax-owed'), 0)::bigint AS tax_minor,
       coalesce(-sum(amount_minor) FILTER (WHERE account_code = 'earned-clinics'), 0)::bigint
         AS earned_minor,
       coalesce(-sum(amount_minor) FILTER (WHERE account_code = 'deferred-clinics'), 0)::bigint
         AS to_earn_minor,
       coalesce(-sum(amount_minor), 0)::bigint AS paid_minor
     FROM entries WHERE clinic_id = ?`,
    [clinicId],
  )
  return rows[0] ?? { paidMinor: 0, taxMinor: 0, earnedMinor: 0, toEarnMinor: 0 }
}
