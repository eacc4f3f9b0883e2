import { readFileSync, readdirSync } from 'node:fs'
import { join } from 'node:path'
import type { Knex } from 'knex'

/** Knex's migrations, written as numbered SQL files: one transaction each, forwards only. */
class SqlFiles implements Knex.MigrationSource<string> {
  readonly #folder: string

  constructor(folder: string) {
    this.#folder = folder
  }

  async getMigrations(): Promise<string[]> {
    return readdirSync(this.#folder)
      .filter((name) => /^\d{4}-[a-z-]+\.sql$/.test(name))
      .sort()
  }

  getMigrationName(name: string): string {
    return name
  }

  async getMigration(name: string): Promise<Knex.Migration> {
    const text = readFileSync(join(this.#folder, name), 'utf8')
    return {
      // Sent as it is: question marks in SQL are not Knex's bindings.
      up: async (trx) => {
        await trx.raw(text.replaceAll('?', '\\?'))
      },
      down: () => Promise.reject(new Error('Migrations go forwards only.')),
    }
  }
}

/** Brings the schema up to date, as `marram_owner`. Resolves to the names of what was applied. */
export async function migrate(owner: Knex, folder: string): Promise<string[]> {
  const [, applied] = (await owner.migrate.latest({
    migrationSource: new SqlFiles(folder),
    tableName: 'schema_migrations',
  })) as [number, string[]]
  return applied
}
