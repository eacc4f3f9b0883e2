import { randomInt } from 'node:crypto'
import { setTimeout } from 'node:timers/promises'
import { isSlug } from '@marram/contract'
import type { Knex } from 'knex'
import type pg from 'pg'
import type { BeginOptions } from '../db/client'
import { refusalOf } from '../db/refusal'
import { invariant } from '../invariant'
import { askBetween, type Question } from './ask'

declare const inside: unique symbol

/** A transaction inside one academy: its rows, and no others, can be seen and written. */
export type AcademyTrx = Knex.Transaction & { readonly [inside]: 'academy' }

/** A transaction outside any academy: accounts, sign-in sessions and other reference tables. */
export type PlainTrx = Knex.Transaction & { readonly [inside]: 'nothing' }

const academies = new WeakMap<object, string>()
const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/

/** The academy that a transaction is inside of. Throws for one that is inside none. */
export function academyOf(trx: object | undefined): string {
  const academyId = trx && academies.get(trx)
  invariant(academyId, 'a query on academy rows ran outside an academy')
  return academyId
}

/**
 * Runs `work` in one transaction inside an academy. The setting that row-level security reads is
 * made with BEGIN, in the same message, and lasts as long as the transaction.
 */
export function inAcademy<T>(
  db: Knex,
  academyId: string,
  work: (trx: AcademyTrx) => Promise<T>,
  options: { readOnly?: boolean } = {},
): Promise<T> {
  invariant(UUID.test(academyId), 'an academy is known by its id')
  const withBegin = `SELECT set_config('app.academy_id', '${academyId}', true)`
  return begin(db, { ...options, withBegin }, (trx) => {
    academies.set(trx, academyId)
    return work(trx as AcademyTrx)
  })
}

/**
 * Asks one read-only question inside the academy of this address, which is found in the same
 * message as BEGIN. All goes out at once: it costs one way there and back. An unknown address sees
 * no rows at all. The model layer does not work in here.
 */
export function askPageOf<Row extends pg.QueryResultRow>(
  db: Knex,
  slug: string,
  question: Question,
): Promise<Row[]> {
  const wanted = isSlug(slug) ? slug : ''
  const begin =
    `BEGIN READ ONLY; SELECT set_config('app.academy_id', ` +
    `coalesce(find_academy_by_slug('${wanted}')::text, ''), true)`
  return askBetween(db, { begin, question })
}

/** Runs `work` in one transaction outside any academy: tenant tables look empty there. */
export function inPlain<T>(db: Knex, work: (trx: PlainTrx) => Promise<T>): Promise<T> {
  return begin(db, {}, (trx) => work(trx as PlainTrx))
}

const DEADLOCK = '40P01'
const TRIES = 3

/**
 * Two transactions that waited for each other: one was undone whole, and is simply run again, a
 * little later, so that the other has what it waited for by then.
 */
async function begin<T>(
  db: Knex,
  options: BeginOptions & { readOnly?: boolean },
  work: (trx: Knex.Transaction) => Promise<T>,
): Promise<T> {
  for (let tried = 1; ; tried += 1) {
    try {
      // Knex hands unknown options on to the transaction class, where BEGIN reads them.
      return await db.transaction(work, options as Knex.TransactionConfig)
    } catch (error) {
      if (refusalOf(error).code !== DEADLOCK || tried === TRIES) throw error
      await setTimeout(randomInt(20, 80) * tried)
    }
  }
}
