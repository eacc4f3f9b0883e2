import { readFileSync } from 'node:fs'
import { resolve } from 'node:path'
import pg from 'pg'
import type { BenchDatabase } from './database'

const TEXT = readFileSync(resolve('tests/load/fill.sql'), 'utf8')

/** Fills a database with this many academies of one shape, and lets the planner look at them. */
export async function fillAcademies(
  { superuserUrl }: BenchDatabase,
  { academies, golfers }: { academies: number; golfers: number },
): Promise<void> {
  const client = new pg.Client({ connectionString: superuserUrl })
  await client.connect()
  try {
    const text = TEXT.replaceAll(':first', '1')
      .replaceAll(':last', String(academies))
      .replaceAll(':golfers', String(golfers))
    await client.query(`BEGIN; ${text}; COMMIT`)
    await client.query('VACUUM ANALYZE')
  } finally {
    await client.end()
  }
}
