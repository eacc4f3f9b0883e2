import type { Knex } from 'knex'
import PgBoss from 'pg-boss'
import { invariant } from '../invariant'
import { ALL_QUEUES, LISTENERS, SWEPT, queueOf, type EventName, type OutboxEvents } from './events'

export interface Outbox {
  /** Writes an event in the caller's transaction; it is heard only if that commits. */
  emit<E extends EventName>(
    trx: Knex.Transaction,
    event: E,
    payload: OutboxEvents[E],
  ): Promise<void>
}

const SCHEMA = 'pgboss'

/** A pg-boss that only sends, and only through the transaction it is given. */
export function makeOutbox(): Outbox {
  const boss = new PgBoss({
    schema: SCHEMA,
    db: { executeSql: () => Promise.reject(new Error('The outbox writes in transactions only.')) },
  })
  return {
    async emit(trx, event, payload) {
      const db = { executeSql: (sql: string, values: unknown[]) => runOn(trx, sql, values) }
      const key = SWEPT[event]
      const once = key ? { singletonKey: String(payload[key]) } : {}
      for (const listener of LISTENERS[event]) {
        const id = await boss.send(queueOf(event, listener), payload, { db, ...once })
        // pg-boss answers null for a job that waits already, and for a queue that was never made.
        invariant(id ?? key, `the queue of ${event} for ${listener} is missing`)
      }
    },
  }
}

/** pg-boss writes `$1`; Knex, which owns the connection, wants `?`, in order of appearance. */
async function runOn(
  trx: Knex.Transaction,
  sql: string,
  values: unknown[] = [],
): Promise<{ rows: unknown[] }> {
  const bindings: unknown[] = []
  const text = sql.replaceAll('?', '\\?').replace(/\$(\d+)/g, (_, position: string) => {
    const value = values[Number(position) - 1]
    // Objects are jsonb parameters; Knex would send an array or object in its own way.
    bindings.push(
      value !== null && typeof value === 'object' ? JSON.stringify(value) : (value ?? null),
    )
    return '?'
  })
  return trx.raw(text, bindings as Knex.RawBinding[])
}

/** Makes the queues and lets the roles at them. Runs with the migrations, as `marram_owner`. */
export async function makeQueues(owner: { url: string; knex: Knex }): Promise<void> {
  const boss = new PgBoss({
    connectionString: owner.url,
    schema: SCHEMA,
    supervise: false,
    schedule: false,
    max: 1,
  })
  await boss.start()
  const known = new Set((await boss.getQueues()).map((queue) => queue.name))
  for (const { name, isSwept } of ALL_QUEUES) {
    const options: PgBoss.Queue = {
      name,
      policy: isSwept ? 'short' : 'standard',
      retryLimit: isSwept ? 0 : 30,
      retryDelay: 2,
      retryBackoff: true,
      expireInSeconds: 120,
    }
    if (known.has(name)) await boss.updateQueue(name, options)
    else await boss.createQueue(name, options)
  }
  await boss.stop({ graceful: false, close: true })
  await owner.knex.raw(`
    GRANT USAGE ON SCHEMA ${SCHEMA} TO marram_app, marram_dispatch;
    GRANT SELECT, INSERT ON ${SCHEMA}.job TO marram_app;
    GRANT SELECT ON ${SCHEMA}.queue TO marram_app;
    GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA ${SCHEMA} TO marram_dispatch;
  `)
}
