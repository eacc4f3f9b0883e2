import type { Scene } from './scene'

interface PlaceInStock {
  id: string
  enrolmentId: string
  sessionId: string
  golferId: string
  state: 'held' | 'confirmed' | 'cancelled'
  netMinor: number
  taxMinor: number
}

/** Everything in the books and the timetable of an academy that the laws speak of. */
export interface Stock {
  sessions: { id: string; state: string; capacity: number; held: number; confirmed: number }[]
  enrolments: { id: string; state: 'held' | 'confirmed' | 'cancelled'; takenBy: string }[]
  places: PlaceInStock[]
  payments: { id: string; enrolmentId: string; method: string; amountMinor: number }[]
  refunds: {
    enrolmentId: string
    reason: string
    method: string
    state: string
    amountMinor: number
  }[]
  /** Called off, with the choice still to be made. */
  owed: { placeId: string; amountMinor: number }[]
  credits: { placeId: string; amountMinor: number }[]
  /** Of each ledger account, a debit positive. */
  balances: Record<string, number>
  /** Currencies in which debits and credits are not the same. */
  unbalanced: string[]
}

/** Reads all of it in one look, with the walls between academies off. */
export async function takeStock({
  db,
  academyId,
}: Pick<Scene, 'db' | 'academyId'>): Promise<Stock> {
  const { rows } = await db.raw<{ rows: { stock: Stock }[] }>(
    `SELECT json_build_object(${Object.entries(PARTS)
      .map(([name, query]) => `'${name}', (${query})`)
      .join(', ')}) AS stock FROM (SELECT :academyId::uuid AS id) a`,
    { academyId },
  )
  const [row] = rows
  if (!row) throw new Error('a look at the books answers')
  return row.stock
}

const list = (query: string) => `SELECT coalesce(json_agg(q), '[]') FROM (${query}) q`

const PARTS: Record<keyof Stock, string> = {
  sessions: list(`SELECT id, state, capacity, held, confirmed FROM sessions
    WHERE academy_id = a.id ORDER BY number`),
  enrolments: list(`SELECT id, state, taken_by AS "takenBy" FROM enrolments
    WHERE academy_id = a.id ORDER BY id`),
  places: list(`SELECT id, enrolment_id AS "enrolmentId", session_id AS "sessionId",
      golfer_id AS "golferId", state, net_minor AS "netMinor", tax_minor AS "taxMinor"
    FROM places WHERE academy_id = a.id ORDER BY id`),
  payments: list(`SELECT p.id, o.enrolment_id AS "enrolmentId", p.method,
      p.amount_minor AS "amountMinor"
    FROM payments p JOIN orders o ON o.academy_id = p.academy_id AND o.id = p.order_id
    WHERE p.academy_id = a.id`),
  refunds: list(`SELECT o.enrolment_id AS "enrolmentId", r.reason, r.method, r.state,
      r.amount_minor AS "amountMinor"
    FROM refunds r JOIN orders o ON o.academy_id = r.academy_id AND o.id = r.order_id
    WHERE r.academy_id = a.id`),
  owed: list(`SELECT place_id AS "placeId", amount_minor AS "amountMinor" FROM owed_places
    WHERE academy_id = a.id AND choice IS NULL`),
  credits: list(`SELECT source_id AS "placeId", amount_minor AS "amountMinor" FROM credit_changes
    WHERE academy_id = a.id`),
  balances: `SELECT coalesce(json_object_agg(account_code, sum), '{}') FROM (
    SELECT account_code, sum(amount_minor) FROM entries WHERE academy_id = a.id
    GROUP BY account_code) q`,
  unbalanced: `SELECT coalesce(json_agg(currency), '[]') FROM (
    SELECT currency FROM entries WHERE academy_id = a.id
    GROUP BY currency HAVING sum(amount_minor) <> 0) q`,
}
