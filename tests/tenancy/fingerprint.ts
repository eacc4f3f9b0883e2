import { connect } from '../../apps/api/src/platform/db/connect'
import type { TestDatabase } from '../support/database'
import { listTables } from './catalogue-queries'

/** Tables that a refused call may touch: who is signed in, and how often somebody tried. */
const LEFT_OUT = ['attempts', 'sign_in_sessions']

/** How many rows each table has and what they hold, in a few characters; and what waits to be told. */
export async function fingerprint(database: TestDatabase): Promise<Record<string, string>> {
  const db = connect({ url: database.superuserUrl, poolSize: 1, name: 'tests' })
  try {
    const names = (await listTables(db)).map(({ name }) => name)
    const seen = names.filter((name) => !LEFT_OUT.includes(name)).map((name) => `public.${name}`)
    const prints: Record<string, string> = {}
    for (const table of [...seen, 'pgboss.job']) {
      const { rows } = await db.raw<{ rows: { print: string }[] }>(
        `SELECT count(*) || ' rows, ' || coalesce(md5(string_agg(t::text, ' ' ORDER BY t::text)), '')
           AS print FROM ${table} t`,
      )
      prints[table] = rows[0]?.print ?? ''
    }
    return prints
  } finally {
    await db.destroy()
  }
}
