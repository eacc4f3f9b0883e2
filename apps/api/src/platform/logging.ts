import pino, { type DestinationStream, type Logger } from 'pino'

/** What a log line may carry beside its message. Everything else is dropped, names and mail first. */
const ALLOWED = new Set([
  'requestId',
  'method',
  'route',
  'status',
  'ms',
  'code',
  'queue',
  'event',
  'academyId',
  'accountId',
  'sessionId',
  'enrolmentId',
  'orderId',
  'refundId',
  'port',
  'mode',
  'count',
  'err',
])

/**
 * Lines go out a few kilobytes at a time, or after a quarter of a second, or when the process ends:
 * one write for each line costs as much as a question to the database.
 */
const STANDARD_OUTPUT = { dest: 1, sync: false, minLength: 4_096, periodicFlush: 250 }

const KEPT_OF_ERRORS = ['type', 'message', 'stack', 'code', 'constraint', 'table'] as const

/**
 * The process's logger. Fields that are not on the allow-list never reach the output, so that a
 * careless line cannot leak what a golfer typed.
 */
export function makeLogger(options: { level: string; destination?: DestinationStream }): Logger {
  return pino(
    {
      level: options.level,
      base: null,
      timestamp: pino.stdTimeFunctions.isoTime,
      formatters: {
        level: (label) => ({ level: label }),
        log: (fields) =>
          Object.fromEntries(Object.entries(fields).filter(([name]) => ALLOWED.has(name))),
      },
      serializers: { err: describeError },
    },
    options.destination ?? pino.destination(STANDARD_OUTPUT),
  )
}

function describeError(error: unknown): Record<string, unknown> {
  if (!(error instanceof Error)) return { type: typeof error }
  const source = error as Error & Record<string, unknown>
  const database = databaseErrorIn(source)
  // A database error's message can repeat a row's values; its code and constraint say enough.
  const all: Record<string, unknown> = database
    ? { ...database, type: error.name, message: 'database error', stack: undefined }
    : { ...source, type: error.name, message: error.message, stack: error.stack }
  return Object.fromEntries(KEPT_OF_ERRORS.map((name) => [name, all[name]]))
}

/** The database's own error: itself, or inside of what the model layer made of it. */
function databaseErrorIn(error: Record<string, unknown>): Record<string, unknown> | null {
  const candidates: unknown[] = [error, error['nativeError'], error['cause']]
  const found = candidates.find(
    (one) => typeof one === 'object' && one !== null && 'severity' in one,
  )
  // It was just seen to be an object.
  return (found as Record<string, unknown> | undefined) ?? null
}

export type { Logger }
