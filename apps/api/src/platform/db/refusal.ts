/** What PostgreSQL refused: its own code, and the constraint where there is one. */
export interface DatabaseRefusal {
  code?: string
  constraint?: string
}

/** Reads a refusal from an error; the models wrap the driver's own error, raw questions do not. */
export function refusalOf(error: unknown): DatabaseRefusal {
  const { nativeError } = Object(error) as { nativeError?: unknown }
  return Object(nativeError ?? error) as DatabaseRefusal
}
