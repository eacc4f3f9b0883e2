import { createRequire } from 'node:module'
import type { Knex } from 'knex'

/** What a transaction is told when it begins. */
export interface BeginOptions {
  /** One SQL statement that is sent in the same message as BEGIN. */
  withBegin?: string
}

interface KnexTransaction {
  readOnly: boolean
  query(connection: unknown, sql: string): Promise<unknown>
}

// Knex has no hook for the statement that opens a transaction; these two classes are its
// internals, which is why its version is pinned and the tenancy tests watch over this file.
const require = createRequire(import.meta.url)
const PgClient = require('knex/lib/dialects/postgres/index.js') as new (
  config: Knex.Config,
) => Knex.Client
const PgTransaction = require('knex/lib/dialects/postgres/execution/pg-transaction.js') as new (
  ...args: unknown[]
) => KnexTransaction

class OneMessageTransaction extends PgTransaction {
  readonly #withBegin: string | undefined

  constructor(...args: unknown[]) {
    super(...args)
    const [, , config] = args as [unknown, unknown, BeginOptions | undefined]
    this.#withBegin = config?.withBegin
  }

  /**
   * Sends BEGIN and does not wait for it: over a pipelined connection what follows is answered
   * after it. Should BEGIN fail, the class we extend rejects the transaction, and what was sent
   * behind it ran inside no academy, where row-level security shows and takes nothing.
   */
  begin(connection: unknown): Promise<unknown> {
    const begin = this.readOnly ? 'BEGIN READ ONLY' : 'BEGIN'
    void this.query(connection, this.#withBegin ? `${begin}; ${this.#withBegin}` : begin)
    return Promise.resolve()
  }
}

/** Knex's PostgreSQL client whose transactions can send a statement along with BEGIN. */
export class MarramPgClient extends PgClient {
  override transaction(...args: unknown[]): Knex.Transaction {
    // Knex's own client returns the same thing under the same name; its types hide the class.
    return new OneMessageTransaction(this, ...args) as unknown as Knex.Transaction
  }
}
