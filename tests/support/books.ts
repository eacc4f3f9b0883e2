import type { Knex } from 'knex'
import { connect } from '../../apps/api/src/platform/db/connect'
import type { World } from './world'

/** Asks the database as somebody whom no wall holds. */
export async function asSuperuser<T>(world: World, ask: (db: Knex) => Promise<T>): Promise<T> {
  const db = connect({ url: world.database.superuserUrl, poolSize: 1, name: 'tests' })
  try {
    return await ask(db)
  } finally {
    await db.destroy()
  }
}

export interface Books {
  /** Debit is positive, credit negative; accounts that are even are left out. */
  balances: Record<string, number>
  /** How many transfers there are of each kind. */
  kinds: Record<string, number>
}

/** An academy's ledger as it stands. Throws for books in which debits and credits differ. */
export function readBooks(world: World, slug: string): Promise<Books> {
  return asSuperuser(world, async (db) => {
    const { rows } = await db.raw<{ rows: { code: string; sum: number }[] }>(
      `SELECT e.account_code AS code, sum(e.amount_minor)::bigint AS sum FROM entries e
       JOIN academies a USING (academy_id) WHERE a.slug = ? GROUP BY 1 ORDER BY 1`,
      [slug],
    )
    const { rows: counts } = await db.raw<{ rows: { kind: string; count: number }[] }>(
      `SELECT t.kind, count(*) AS count FROM transfers t JOIN academies a USING (academy_id)
       WHERE a.slug = ? GROUP BY 1 ORDER BY 1`,
      [slug],
    )
    const difference = rows.reduce((sum, row) => sum + row.sum, 0)
    if (difference !== 0) throw new Error(`Debits and credits differ by ${difference}.`)
    return {
      balances: Object.fromEntries(
        rows.filter(({ sum }) => sum !== 0).map(({ code, sum }) => [code, sum]),
      ),
      kinds: Object.fromEntries(counts.map(({ kind, count }) => [kind, count])),
    }
  })
}
