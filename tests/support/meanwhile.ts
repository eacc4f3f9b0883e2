import type { Knex } from 'knex'
import { asSuperuser } from './books'
import type { World } from './world'

/**
 * Changes something in a transaction, and lets somebody act while it is still open. It is committed
 * once they wait for it, so that they find the change at the worst of moments.
 */
export function actMeanwhile<T>(
  world: World,
  change: (trx: Knex) => PromiseLike<unknown>,
  act: () => Promise<T>,
): Promise<T> {
  return asSuperuser(world, async (db) => {
    const { acting } = await db.transaction(async (trx) => {
      await change(trx)
      const progress = { isDone: false }
      const acting = act().finally(() => (progress.isDone = true))
      while (!progress.isDone && !(await isWaitedFor(trx)));
      // Wrapped, so that the transaction does not wait for who waits for it.
      return { acting }
    })
    return acting
  })
}

async function isWaitedFor(trx: Knex): Promise<boolean> {
  const { rows } = await trx.raw<{ rows: unknown[] }>(
    `SELECT 1 FROM pg_locks
     WHERE NOT granted AND pg_backend_pid() = ANY(pg_blocking_pids(pid)) LIMIT 1`,
  )
  return rows.length > 0
}
