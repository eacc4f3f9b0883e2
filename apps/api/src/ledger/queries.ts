import type { AcademyTrx } from '../platform/tenancy/transaction'
import type { LedgerAccount } from './accounts'
import type { EntryDraft, Posting } from './postings'

/**
 * Writes a transfer with all its entries in one statement. Resolves to false when the same thing
 * was posted before, by the idempotency key of a transfer.
 */
export async function insertTransfer(
  trx: AcademyTrx,
  given: { id: string; posting: Posting; currency: string; postedAt: Date },
): Promise<boolean> {
  const { id, posting, currency, postedAt } = given
  const { entries, ...transfer } = posting
  const { rows } = await trx.raw<{ rows: { count: number }[] }>(
    `WITH transfer AS (
       INSERT INTO transfers (academy_id, id, kind, source_type, source_id, revision, what,
         happened_on, posted_at)
       VALUES (current_setting('app.academy_id')::uuid, :id, :kind, :sourceType, :sourceId,
         :revision, :what, :happenedOn, :postedAt)
       ON CONFLICT (academy_id, source_type, source_id, kind, revision) DO NOTHING
       RETURNING academy_id),
     drafts AS (
       SELECT * FROM unnest(:accounts::text[], :amounts::bigint[], :clinicIds::uuid[],
         :sessionIds::uuid[], :heldOns::date[])
         WITH ORDINALITY AS d (account, amount, clinic_id, session_id, held_on, position)),
     accounts AS (
       INSERT INTO ledger_accounts (academy_id, code)
       SELECT DISTINCT t.academy_id, d.account FROM transfer t, drafts d
       ON CONFLICT DO NOTHING),
     entries AS (
       INSERT INTO entries (academy_id, transfer_id, position, account_code, currency,
         amount_minor, happened_on, clinic_id, session_id, held_on)
       SELECT t.academy_id, :id, d.position, d.account, :currency, d.amount, :happenedOn,
         d.clinic_id, d.session_id, d.held_on
       FROM transfer t, drafts d)
     SELECT count(*) AS count FROM transfer`,
    {
      id,
      ...transfer,
      currency,
      postedAt,
      accounts: entries.map(({ account }) => account),
      amounts: entries.map(({ amountMinor }) => amountMinor),
      clinicIds: entries.map(({ clinicId }) => clinicId ?? null),
      sessionIds: entries.map(({ sessionId }) => sessionId ?? null),
      heldOns: entries.map(({ heldOn }) => heldOn ?? null),
    },
  )
  return rows[0]?.count === 1
}

interface EntryRow {
  accountCode: LedgerAccount
  amountMinor: number
  clinicId: string | null
  sessionId: string | null
  heldOn: string | null
}

/** The entries of a transfer, as they were posted; null when it never was. */
export async function findTransferEntries(
  trx: AcademyTrx,
  key: Pick<Posting, 'sourceType' | 'sourceId' | 'kind' | 'revision'>,
): Promise<EntryDraft[] | null> {
  const { rows } = await trx.raw<{ rows: EntryRow[] }>(
    `SELECT e.account_code, e.amount_minor, e.clinic_id, e.session_id, e.held_on
     FROM transfers t JOIN entries e ON e.academy_id = t.academy_id AND e.transfer_id = t.id
     WHERE t.source_type = :sourceType AND t.source_id = :sourceId AND t.kind = :kind
       AND t.revision = :revision ORDER BY e.position`,
    { ...key },
  )
  if (rows.length === 0) return null
  return rows.map(({ accountCode, amountMinor, clinicId, sessionId, heldOn }) => ({
    account: accountCode,
    amountMinor,
    ...(clinicId && sessionId && heldOn ? { clinicId, sessionId, heldOn } : {}),
  }))
}

export interface SumRow {
  clinicId: string | null
  month: number
  sum: number
}

/** Earned, or still deferred, by clinic and month of the year; credits come out positive. */
export async function sumByClinicAndMonth(
  trx: AcademyTrx,
  { account, year, by }: { account: LedgerAccount; year: number; by: 'happened_on' | 'held_on' },
): Promise<SumRow[]> {
  const { rows } = await trx.raw<{ rows: SumRow[] }>(
    `SELECT clinic_id, extract(month FROM ${by})::int AS month, -sum(amount_minor)::bigint AS sum
     FROM entries WHERE account_code = :account
       AND ${by} >= make_date(:year, 1, 1) AND ${by} < make_date(:year + 1, 1, 1)
     GROUP BY clinic_id, month HAVING sum(amount_minor) <> 0`,
    { account, year },
  )
  return rows
}

/** The balance of an account over all time; a debit balance is positive. */
export async function readBalances(
  trx: AcademyTrx,
): Promise<Partial<Record<LedgerAccount, number>>> {
  const { rows } = await trx.raw<{ rows: { accountCode: LedgerAccount; sum: number }[] }>(
    `SELECT account_code, sum(amount_minor)::bigint AS sum FROM entries GROUP BY account_code`,
  )
  return Object.fromEntries(rows.map(({ accountCode, sum }) => [accountCode, sum]))
}

export interface FigureFilter {
  accounts: readonly LedgerAccount[]
  kinds: readonly string[] | null
  year: number
  month: number | null
  clinicId: string | null
  by: 'happened_on' | 'held_on'
  /** Balances run from the beginning; flows are of the year alone. */
  isBalance: boolean
}

const FILTER = (by: string, isBalance: boolean): string => `
  e.account_code = ANY(:accounts::text[])
  AND (:kinds::text[] IS NULL OR t.kind = ANY(:kinds::text[]))
  AND (:clinicId::uuid IS NULL OR e.clinic_id = :clinicId)
  AND (:month::int IS NULL OR extract(month FROM e.${by}) = :month)
  ${isBalance ? '' : `AND e.${by} >= make_date(:year, 1, 1) AND e.${by} < make_date(:year + 1, 1, 1)`}`

export interface FigureTransferRow {
  id: string
  happenedOn: string
  what: string
  amountMinor: number
  debit: LedgerAccount[]
  credit: LedgerAccount[]
}

/** The transfers behind a figure, each with its part of it; debits positive. */
export async function listFigureTransfers(
  trx: AcademyTrx,
  filter: FigureFilter,
): Promise<FigureTransferRow[]> {
  const { rows } = await trx.raw<{ rows: FigureTransferRow[] }>(
    `WITH part AS (
       SELECT t.id, t.happened_on, t.what, t.posted_at, sum(e.amount_minor)::bigint AS amount_minor
       FROM entries e JOIN transfers t ON t.academy_id = e.academy_id AND t.id = e.transfer_id
       WHERE ${FILTER(filter.by, filter.isBalance)}
       GROUP BY t.id, t.happened_on, t.what, t.posted_at HAVING sum(e.amount_minor) <> 0)
     SELECT p.id, p.happened_on, p.what, p.amount_minor,
       (SELECT json_agg(DISTINCT e.account_code) FROM entries e
          WHERE e.transfer_id = p.id AND e.amount_minor > 0) AS debit,
       (SELECT json_agg(DISTINCT e.account_code) FROM entries e
          WHERE e.transfer_id = p.id AND e.amount_minor < 0) AS credit
     FROM part p ORDER BY p.happened_on, p.posted_at, p.id`,
    bindingsOf(filter),
  )
  return rows
}

export interface FlowRow {
  sum: number
  count: number
}

/** The total of a figure and how many transfers make it. */
export async function sumFigure(trx: AcademyTrx, filter: FigureFilter): Promise<FlowRow> {
  const { rows } = await trx.raw<{ rows: FlowRow[] }>(
    `SELECT coalesce(sum(e.amount_minor), 0)::bigint AS sum, count(DISTINCT t.id) AS count
     FROM entries e JOIN transfers t ON t.academy_id = e.academy_id AND t.id = e.transfer_id
     WHERE ${FILTER(filter.by, filter.isBalance)}`,
    bindingsOf(filter),
  )
  return rows[0] ?? { sum: 0, count: 0 }
}

function bindingsOf({ accounts, kinds, year, month, clinicId }: FigureFilter) {
  return { accounts: [...accounts], kinds: kinds ? [...kinds] : null, year, month, clinicId }
}

export interface ExportRow {
  happenedOn: string
  postedAt: Date
  transferId: string
  what: string
  kind: string
  account: LedgerAccount
  debitMinor: number
  creditMinor: number
  currency: string
  heldOn: string | null
}

/** Every entry of a year, in the order of the books. */
export async function listEntriesOfYear(trx: AcademyTrx, year: number): Promise<ExportRow[]> {
  const { rows } = await trx.raw<{ rows: ExportRow[] }>(
    `SELECT t.happened_on, t.posted_at, t.id AS transfer_id, t.what, t.kind,
       e.account_code AS account, greatest(e.amount_minor, 0) AS debit_minor,
       greatest(-e.amount_minor, 0) AS credit_minor, e.currency, e.held_on
     FROM transfers t JOIN entries e ON e.academy_id = t.academy_id AND e.transfer_id = t.id
     WHERE t.happened_on >= make_date(:year, 1, 1) AND t.happened_on < make_date(:year + 1, 1, 1)
     ORDER BY t.happened_on, t.posted_at, t.id, e.position`,
    { year },
  )
  return rows
}
