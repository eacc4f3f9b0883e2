import { setTimeout } from 'node:timers/promises'
import PgBoss from 'pg-boss'
import { ALL_QUEUES, queueOf, type EventName, type Handlers, type Listener } from './events'

/** Taken from a queue at once: few enough to be handled, one after another, before they expire. */
const BATCH = 5

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

  const pace = makePace()
  let listening: Promise<unknown> = Promise.resolve()
  const listen = async (queue: string): Promise<void> => {
    while (!pace.isOver) {
      try {
        await drainQueue(boss, queue, handle, pace)
      } catch (error) {
        options.onError(error, queue)
      }
      await pace.pause()
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
      listening = Promise.all(ALL_QUEUES.map(({ name }) => listen(name)))
    },
    async drain() {
      await open()
      let handled = 0
      for (let before = -1; before !== handled;) {
        before = handled
        for (const { name } of ALL_QUEUES) handled += await drainQueue(boss, name, handle)
      }
      return handled
    },
    async stop() {
      pace.end()
      await listening
      await boss.stop({ graceful: false })
    },
  }
}

const PAUSE_MS = 500

/** Pauses between looks into an empty queue, cut short when it is over. */
function makePace() {
  const over = new AbortController()
  return {
    get isOver() {
      return over.signal.aborted
    },
    end: () => over.abort(),
    pause: () => setTimeout(PAUSE_MS, undefined, { signal: over.signal }).catch(() => undefined),
  }
}

async function drainQueue(
  boss: PgBoss,
  queue: string,
  handle: (queue: string, payload: object) => Promise<void>,
  until: { isOver: boolean } = { isOver: false },
): Promise<number> {
  let handled = 0
  for (;;) {
    if (until.isOver) return handled
    const jobs = await boss.fetch<object>(queue, { batchSize: BATCH })
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
  const missing = ALL_QUEUES.filter(({ name }) => !byQueue.has(name)).map(({ name }) => name)
  if (missing.length > 0) throw new Error(`Nobody handles: ${missing.join(', ')}.`)
  return byQueue
}
