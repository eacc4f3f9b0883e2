import type { Knex } from 'knex'
import { asSuperuser } from './books'
import type { World } from './world'

type Change = (trx: Knex) => PromiseLike<unknown>

/**
 * Changes something in a transaction, and lets somebody act while it is still open. It is committed
 * once they wait for it, so that they find the change at the worst of moments.
 */
export async function actMeanwhile<T>(
  world: World,
  change: Change,
  act: () => Promise<T>,
): Promise<T> {
  const { answer } = await watchMeanwhile(world, change, act)
  return answer
}

/** As `actMeanwhile`, and says whether they had to wait. */
export function watchMeanwhile<T>(
  world: World,
  change: Change,
  act: () => Promise<T>,
): Promise<{ answer: T; hasWaited: boolean }> {
  return asSuperuser(world, async (db) => {
    const { acting, hasWaited } = await db.transaction(async (trx) => {
      await change(trx)
      const progress = { isDone: false, hasWaited: false }
      const acting = act().finally(() => (progress.isDone = true))
      while (!progress.isDone && !progress.hasWaited) progress.hasWaited = await isWaitedFor(trx)
      // Wrapped, so that the transaction does not wait for who waits for it.
      return { acting, hasWaited: progress.hasWaited }
    })
    return { answer: await acting, hasWaited }
  })
}

async function isWaitedFor(trx: Knex): Promise<boolean> {
  const { rows } = await trx.raw<{ rows: unknown[] }>(
    `SELECT 1 FROM pg_locks
     WHERE NOT granted AND pg_backend_pid() = ANY(pg_blocking_pids(pid)) LIMIT 1`,
  )
  return rows.length > 0
}
