import PgBoss from 'pg-boss'
import { ALL_QUEUES, queueOf, type EventName, type Handlers, type Listener } from './events'

type AnyHandler = (payload: object) => Promise<void>

export interface Dispatcher {
  /** Starts listening; handlers run at least once for each event. */
  start(): Promise<void>
  /** Handles everything that is waiting, now, and resolves to how many there were. */
  drain(): Promise<number>
  /** Lets running handlers finish, then stops. */
  stop(): Promise<void>
}

/**
 * Brings events to their handlers. Connects as the dispatcher's role; the handlers themselves work
 * inside the event's academy, as the app's role.
 */
export function makeDispatcher(options: {
  url: string
  listeners: Record<Listener, Handlers>
  onError: (error: unknown, queue: string) => void
}): Dispatcher {
  const boss = new PgBoss({
    connectionString: options.url,
    schema: 'pgboss',
    migrate: false,
    schedule: false,
    max: 4,
  })
  boss.on('error', (error) => options.onError(error, 'pg-boss'))
  const handlers = handlersByQueue(options.listeners)

  const handle = async (queue: string, payload: object): Promise<void> => {
    const handler = handlers.get(queue)
    if (!handler) throw new Error(`Nobody handles ${queue}.`)
    try {
      await handler(payload)
    } catch (error) {
      options.onError(error, queue)
      throw error
    }
  }

  let isOpen = false
  const open = async (): Promise<void> => {
    if (!isOpen) await boss.start()
    isOpen = true
  }

  return {
    async start() {
      await open()
      for (const queue of ALL_QUEUES) {
        const pace = { pollingIntervalSeconds: 0.5, batchSize: 1 }
        await boss.work<object>(queue, pace, async ([job]) => {
          if (job) await handle(queue, job.data)
        })
      }
    },
    async drain() {
      await open()
      let handled = 0
      for (let before = -1; before !== handled;) {
        before = handled
        for (const queue of ALL_QUEUES) handled += await drainQueue(boss, queue, handle)
      }
      return handled
    },
    stop: () => boss.stop({ graceful: true, timeout: 10_000 }),
  }
}

async function drainQueue(
  boss: PgBoss,
  queue: string,
  handle: (queue: string, payload: object) => Promise<void>,
): Promise<number> {
  let handled = 0
  for (;;) {
    const jobs = await boss.fetch<object>(queue, { batchSize: 50 })
    if (jobs.length === 0) return handled
    for (const job of jobs) {
      try {
        await handle(queue, job.data)
        await boss.complete(queue, job.id)
      } catch (error) {
        await boss.fail(queue, job.id, { message: String(error) })
      }
      handled += 1
    }
  }
}

function handlersByQueue(listeners: Record<Listener, Handlers>): Map<string, AnyHandler> {
  const byQueue = new Map<string, AnyHandler>()
  for (const [listener, handlers] of Object.entries(listeners)) {
    for (const [event, handler] of Object.entries(handlers)) {
      // The pair of event and handler was typed where it was declared.
      byQueue.set(queueOf(event as EventName, listener), handler as AnyHandler)
    }
  }
  const missing = ALL_QUEUES.filter((queue) => !byQueue.has(queue))
  if (missing.length > 0) throw new Error(`Nobody handles: ${missing.join(', ')}.`)
  return byQueue
}
