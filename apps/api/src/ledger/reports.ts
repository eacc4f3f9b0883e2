import type { Answer } from '@marram/contract'
import { stringify } from 'csv-stringify/sync'
import { toCurrencyCode, toDecimal } from '@marram/money'
import { Download } from '../platform/http/context'
import { localDayOf } from '../platform/local-day'
import type { Services } from '../platform/services'
import { inAcademy } from '../platform/tenancy/transaction'
import { neutraliseCell } from './csv-cells'
import { FIGURES, type Figure } from './figures'
import {
  listEntriesOfYear,
  listFigureTransfers,
  readBalances,
  sumByClinicAndMonth,
  sumFigure,
  type FigureFilter,
  type SumRow,
} from './queries'

/** What the ledger must be told of the academy, since it knows no other feature. */
export interface BooksOf {
  academyId: string
  currency: string
  zone: string
  titles: ReadonlyMap<string, string>
}

/** The money card of a year: what was earned and is still to be earned, by clinic and month. */
export async function readMoneyCard(
  { db, clock }: Services,
  { books, year }: { books: BooksOf; year: number },
): Promise<Answer<'ledger.card'>> {
  return inAcademy(
    db,
    books.academyId,
    async (trx) => {
      const flow = (figure: Figure) => sumFigure(trx, filterOf(figure, { year }))
      const earned = await sumByClinicAndMonth(trx, {
        account: 'earned-clinics',
        year,
        by: 'happened_on',
      })
      const toEarn = await sumByClinicAndMonth(trx, {
        account: 'deferred-clinics',
        year,
        by: 'held_on',
      })
      const late = await sumByClinicAndMonth(trx, {
        account: 'earned-late-cancellations',
        year,
        by: 'happened_on',
      })
      const tax = await sumByClinicAndMonth(trx, { account: 'tax-owed', year, by: 'happened_on' })
      const balances = await readBalances(trx)
      const taken = await flow('taken')
      const refunded = await flow('refunded')
      const today = localDayOf(clock.now(), books.zone)
      return {
        year,
        currency: books.currency,
        currentMonth: today.startsWith(String(year)) ? Number(today.slice(5, 7)) : null,
        clinics: byClinic({ earned, toEarn, titles: books.titles }),
        lateCancellations: byMonth(late),
        taxOwed: byMonth(tax),
        takenMinor: taken.sum,
        payments: taken.count,
        refundedMinor: 0 - refunded.sum,
        refunds: refunded.count,
        feesMinor: (await flow('fees')).sum,
        providerBalanceMinor: balances['provider-clearing'] ?? 0,
        owedAtDeskMinor: balances.receivable ?? 0,
        creditsOwedMinor: 0 - (balances['credits-owed'] ?? 0),
        toEarnMinor: 0 - (balances['deferred-clinics'] ?? 0),
      }
    },
    { readOnly: true },
  )
}

function byClinic(given: {
  earned: readonly SumRow[]
  toEarn: readonly SumRow[]
  titles: ReadonlyMap<string, string>
}): Answer<'ledger.card'>['clinics'] {
  const cards = new Map<string, Answer<'ledger.card'>['clinics'][number]>()
  const monthOf = ({ clinicId, month }: SumRow) => {
    const id = clinicId ?? ''
    let card = cards.get(id)
    if (!card) {
      const months = Array.from({ length: 12 }, () => ({ earnedMinor: 0, toEarnMinor: 0 }))
      card = { clinicId: id, title: given.titles.get(id) ?? 'Clinic', months }
      cards.set(id, card)
    }
    return card.months[month - 1]
  }
  for (const row of given.earned) Object.assign(monthOf(row) ?? {}, { earnedMinor: row.sum })
  for (const row of given.toEarn) Object.assign(monthOf(row) ?? {}, { toEarnMinor: row.sum })
  return [...cards.values()].sort((a, b) => a.title.localeCompare(b.title))
}

function byMonth(rows: readonly SumRow[]): number[] {
  const months = Array<number>(12).fill(0)
  for (const { month, sum } of rows) months[month - 1] = (months[month - 1] ?? 0) + sum
  return months
}

function filterOf(
  figure: Figure,
  { year, month, clinicId }: { year: number; month?: number; clinicId?: string },
): FigureFilter {
  const { sign: _, ...rule } = FIGURES[figure]
  return { ...rule, year, month: month ?? null, clinicId: clinicId ?? null }
}

/** The transfers that make a figure; their amounts add up to it. */
export async function readFigure(
  { db }: Services,
  wanted: { academyId: string; figure: Figure; year: number; month?: number; clinicId?: string },
): Promise<Answer<'ledger.transfers'>> {
  return inAcademy(
    db,
    wanted.academyId,
    async (trx) => {
      const { sign } = FIGURES[wanted.figure]
      const rows = await listFigureTransfers(trx, filterOf(wanted.figure, wanted))
      return {
        totalMinor: rows.reduce((sum, { amountMinor }) => sum + sign * amountMinor, 0),
        transfers: rows.map(({ id, happenedOn, what, debit, credit, amountMinor }) => ({
          id,
          dayLocal: happenedOn,
          what,
          debit,
          credit,
          amountMinor: sign * amountMinor,
        })),
      }
    },
    { readOnly: true },
  )
}

/** Every entry of a year as CSV, for the bookkeeper. */
export async function exportYear(
  { db }: Services,
  { academyId, year }: { academyId: string; year: number },
): Promise<Download> {
  const rows = await inAcademy(db, academyId, (trx) => listEntriesOfYear(trx, year), {
    readOnly: true,
  })
  const header = [
    'day',
    'transfer',
    'kind',
    'what',
    'account',
    'debit',
    'credit',
    'currency',
    'session_day',
  ]
  const lines = rows.map((row) => {
    const currency = toCurrencyCode(row.currency)
    const amount = (amountMinor: number) =>
      amountMinor ? toDecimal({ amountMinor, currency }) : ''
    return [
      row.happenedOn,
      row.transferId,
      row.kind,
      neutraliseCell(row.what),
      row.account,
      amount(row.debitMinor),
      amount(row.creditMinor),
      row.currency,
      row.heldOn ?? '',
    ]
  })
  return new Download({
    contentType: 'text/csv; charset=utf-8',
    filename: `entries-${year}.csv`,
    text: stringify([header, ...lines]),
  })
}
