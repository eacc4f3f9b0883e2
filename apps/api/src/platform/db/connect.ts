import knex, { type Knex } from 'knex'
import { knexSnakeCaseMappers } from 'objection'
import pg from 'pg'
import { MarramPgClient } from './client'

/**
 * Types by the number the server gives them: the driver's own list misses arrays, which is why its
 * function is typed anew here.
 */
const parseAs = pg.types.setTypeParser as (type: number, parse: (text: string) => unknown) => void
const INT8 = 20
const NUMERIC = 1700
const DATE = 1082
const DATE_ARRAY = 1182

// Counts and minor units fit in a double exactly; one that does not must stop us, not round.
parseAs(INT8, (text) => {
  const value = Number(text)
  if (!Number.isSafeInteger(value)) throw new RangeError(`${text} is beyond a safe integer`)
  return value
})
parseAs(NUMERIC, Number)
// A calendar day has no zone: it stays text.
parseAs(DATE, (text) => text)
parseAs(DATE_ARRAY, (text: string) => text.slice(1, -1).split(',').filter(Boolean))

const names = knexSnakeCaseMappers()

/** The library renames the columns of built queries; raw ones answer with their rows inside. */
function toCamelCase(response: unknown): unknown {
  const { rows } = Object(response) as { rows?: unknown }
  if (Array.isArray(rows)) return { rows: names.postProcessResponse(rows) as unknown }
  return names.postProcessResponse(response) as unknown
}

/** Opens a pool. Rows come back in camelCase, and identifiers go out in snake_case. */
export function connect(options: { url: string; poolSize: number; name: string }): Knex {
  const connection = {
    connectionString: options.url,
    application_name: options.name,
    statement_timeout: 15_000,
    idle_in_transaction_session_timeout: 30_000,
    // What is asked before the last answer came goes out at once and is answered in order. Knex
    // hands the settings on to the driver, whose newer ones its types do not know.
    pipeline: true,
  }
  return knex({
    // Typed as Knex's own class, whose constructor it shares.
    client: MarramPgClient as unknown as typeof Knex.Client,
    connection,
    pool: { min: 0, max: options.poolSize },
    acquireConnectionTimeout: 15_000,
    wrapIdentifier: (name, original) => names.wrapIdentifier(name, original),
    postProcessResponse: toCamelCase,
  })
}
