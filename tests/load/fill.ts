import { readFileSync } from 'node:fs'
import { resolve } from 'node:path'
import pg from 'pg'
import type { BenchDatabase } from './database'

const ACADEMIES = readFileSync(resolve('tests/load/fill.sql'), 'utf8')

/** Fills a database with academies of one shape, and lets the planner look at them. */
export async function fillDatabase(
  { superuserUrl }: BenchDatabase,
  { academies, golfers }: { academies: number; golfers: number },
): Promise<void> {
  const run = (text: string) => runAlone(superuserUrl, text)
  await run(`
    INSERT INTO accounts (id, email, email_verified_at, name, created_at)
    SELECT md5('account:' || n)::uuid, 'golfer-' || n || '@mail.example', now(), 'Golfer ' || n,
      now()
    FROM generate_series(1, ${golfers}) AS n`)
  // In two halves at once, since filling keeps a processor busy and most machines have two.
  const middle = Math.ceil(academies / 2)
  const halves = [
    { first: 1, last: middle },
    { first: middle + 1, last: academies },
  ]
  await Promise.all(
    halves.map(({ first, last }) =>
      run(ACADEMIES.replaceAll(':first', String(first)).replaceAll(':last', String(last))),
    ),
  )
  await run('VACUUM ANALYZE')
}

/** One connection, one message: what is several statements is one transaction. */
export async function runAlone(url: string, text: string): Promise<void> {
  await readRows(url, text)
}

export async function readRows<Row extends pg.QueryResultRow>(
  url: string,
  text: string,
): Promise<Row[]> {
  const client = new pg.Client({ connectionString: url })
  await client.connect()
  try {
    const { rows } = await client.query<Row>(text)
    return rows
  } finally {
    await client.end()
  }
}
