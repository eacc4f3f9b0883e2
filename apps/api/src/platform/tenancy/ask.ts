import type { Knex } from 'knex'
import type pg from 'pg'
import { invariant } from '../invariant'
import { together } from './together'

/**
 * A question in raw SQL, with `$1` for its values. Its name is its own: each connection plans what
 * it names once. Columns come back under the names that the text gives them.
 */
export interface Question {
  name: string
  text: string
  values: readonly unknown[]
}

// Knex types its client as anything; its pool holds the driver's clients.
interface ConnectionPool {
  acquireConnection(): Promise<pg.Client>
  releaseConnection(connection: pg.Client): Promise<void>
}

/**
 * Asks inside a transaction, by the shortest way to the driver. For the few questions that are
 * asked most: the model layer does not work here, so that row-level security alone keeps academies
 * apart.
 */
export async function ask<Row extends pg.QueryResultRow>(
  trx: Knex.Transaction,
  question: Question,
): Promise<Row[]> {
  invariant(!trx.isCompleted(), 'a question was asked after its transaction had ended')
  // Within a transaction the pool is one connection, and it stays the transaction's.
  const connection = await (trx.client as ConnectionPool).acquireConnection()
  const { rows } = await connection.query<Row>({ ...question, values: [...question.values] })
  return rows
}

/** Asks one question between two statements, all sent at once: one way there and back. */
export async function askBetween<Row extends pg.QueryResultRow>(
  db: Knex,
  given: { begin: string; question: Question },
): Promise<Row[]> {
  const { begin, question } = given
  const pool = db.client as ConnectionPool
  const connection = await pool.acquireConnection()
  try {
    const [, { rows }] = await together(
      connection.query(begin),
      connection.query<Row>({ ...question, values: [...question.values] }),
      connection.query('COMMIT'),
    )
    return rows
  } finally {
    await pool.releaseConnection(connection)
  }
}
