import type { Knex } from 'knex'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { connect } from '../../apps/api/src/platform/db/connect'
import { inAcademy, inPlain } from '../../apps/api/src/platform/tenancy/transaction'
import { useWorld } from '../support/use-world'
import { listForeignKeys, listTables } from './catalogue-queries'
import { playTwoSeasons } from './two-seasons'

const world = await useWorld()
let superuser: Knex
let app: Knex
let ours: string
let theirs: string
let tables: string[]

beforeAll(async () => {
  superuser = connect({ url: world.database.superuserUrl, poolSize: 1, name: 'tests' })
  app = connect({ url: world.database.url, poolSize: 1, name: 'tests' })
  const seasons = await playTwoSeasons(world)
  ours = seasons.ours.academyId
  theirs = seasons.theirs.academyId
  const tenants = (await listTables(superuser)).filter(({ isTenant }) => isTenant)
  tables = tenants.map(({ name }) => name)
}, 120_000)
afterAll(async () => {
  await app.destroy()
  await superuser.destroy()
})

const countRaw = async (db: Knex, sql: string, bindings: Knex.ValueDict = {}): Promise<number> => {
  const { rows } = await db.raw<{ rows: { count: number }[] }>(sql, bindings)
  return rows[0]!.count
}

const BY_POLICY = 'refused by the policy'

/** Runs one statement as the app in our academy, and takes it back. Resolves to how it went. */
async function outcomeOf(sql: string, bindings: Knex.ValueDict = {}): Promise<string> {
  const undo = new Error('it went through')
  const tried = inAcademy(app, ours, async (trx) => {
    await trx.raw(sql, bindings)
    throw undo
  })
  const { message } = await tried.catch((error: unknown) => error as Error)
  return message.includes('violates row-level security policy') ? BY_POLICY : message
}

const isGranted = async (table: string, privilege: string): Promise<boolean> => {
  const { rows } = await superuser.raw<{ rows: { can: boolean }[] }>(
    `SELECT has_table_privilege('marram_app', ?, ?) AS can`,
    [table, privilege],
  )
  return rows[0]!.can
}

describe('row-level security alone, with raw SQL as the app', () => {
  it('has rows of both academies to keep apart, in every table', async () => {
    for (const table of tables) {
      const sql = `SELECT count(DISTINCT academy_id) FROM ${table}`
      expect({ table, academies: await countRaw(superuser, sql) }).toEqual({ table, academies: 2 })
    }
  })

  it('shows the rows of one academy, and all of these', async () => {
    for (const table of tables) {
      const sql = `SELECT count(*) FROM ${table}`
      const own = `${sql} WHERE academy_id = :ours`
      const seen = await inAcademy(app, ours, async (trx) => ({
        all: await countRaw(trx, sql),
        theirs: await countRaw(trx, `${sql} WHERE academy_id = :theirs`, { theirs }),
      }))
      expect({ table, ...seen }).toEqual({
        table,
        all: await countRaw(superuser, own, { ours }),
        theirs: 0,
      })
    }
  })

  it('shows nothing without the setting, nor after a transaction that had one', async () => {
    for (const table of tables) {
      await inAcademy(app, ours, (trx) => trx.raw('SELECT 1'))
      const seen = await inPlain(app, (trx) => countRaw(trx, `SELECT count(*) FROM ${table}`))
      expect({ table, seen }).toEqual({ table, seen: 0 })
    }
  })

  it('changes none of their rows', async () => {
    for (const table of tables) {
      if (!(await isGranted(table, 'UPDATE'))) continue
      const changed = await inAcademy(app, ours, (trx) =>
        countRaw(
          trx,
          `WITH changed AS (UPDATE ${table} SET academy_id = academy_id
                            WHERE academy_id = :theirs RETURNING 1)
           SELECT count(*) FROM changed`,
          { theirs },
        ),
      )
      expect({ table, changed }).toEqual({ table, changed: 0 })
    }
  })

  it('deletes none of their rows', async () => {
    for (const table of tables) {
      if (!(await isGranted(table, 'DELETE'))) continue
      const deleted = await inAcademy(app, ours, (trx) =>
        countRaw(
          trx,
          `WITH deleted AS (DELETE FROM ${table} WHERE academy_id = :theirs RETURNING 1)
           SELECT count(*) FROM deleted`,
          { theirs },
        ),
      )
      expect({ table, deleted }).toEqual({ table, deleted: 0 })
    }
  })

  it('hands none of our rows over', async () => {
    for (const table of tables) {
      if (!(await isGranted(table, 'UPDATE'))) continue
      const outcome = await outcomeOf(`UPDATE ${table} SET academy_id = :theirs`, { theirs })
      expect({ table, outcome }).toEqual({ table, outcome: BY_POLICY })
    }
  })

  it('takes no row in their name', async () => {
    for (const table of tables) {
      const { columns, row } = await rowToCopy(table)
      const outcome = await outcomeOf(
        `INSERT INTO ${table} (${columns})
         SELECT ${columns} FROM json_populate_record(null::${table}, :row)`,
        { row },
      )
      expect({ table, outcome }).toEqual({ table, outcome: BY_POLICY })
    }
  })

  /** One of their rows, and the columns that the app may write. */
  async function rowToCopy(table: string): Promise<{ columns: string; row: string }> {
    const { rows } = await superuser.raw<{ rows: { columns: string; row: object }[] }>(
      `SELECT (SELECT string_agg(attname, ', ') FROM pg_attribute
               WHERE attrelid = '${table}'::regclass AND attnum > 0 AND NOT attisdropped
                 AND has_column_privilege('marram_app', attrelid, attnum, 'INSERT')) AS columns,
              (SELECT to_json(t) FROM ${table} t WHERE academy_id = :theirs LIMIT 1) AS row`,
      { theirs },
    )
    const { columns, row } = rows[0]!
    return { columns, row: JSON.stringify(row) }
  }
})

describe('keys alone, as a superuser whom no policy holds', () => {
  it('refuse every reference into the other academy', async () => {
    // Ledger accounts have the same codes everywhere: one that only they have makes it a reference.
    await superuser('ledger_accounts').insert({ academyId: theirs, code: 'theirs-alone' })
    const keys = (await listForeignKeys(superuser)).filter(
      ({ isBetweenTenants, columns }) => isBetweenTenants && columns.includes(','),
    )
    for (const { name, from, to, columns, referenced } of keys) {
      const [, own] = columns.split(', ')
      const [, parent] = referenced.split(', ')
      const change = superuser.raw(
        `UPDATE ${from} SET ${own} =
           (SELECT ${parent} FROM ${to} WHERE academy_id = :theirs AND ${parent}::text NOT IN
             (SELECT ${parent}::text FROM ${to} WHERE academy_id = :ours) LIMIT 1)
         WHERE ctid = (SELECT ctid FROM ${from} WHERE academy_id = :ours LIMIT 1)`,
        { ours, theirs },
      )
      const refusal = { code: '23503', constraint: name }
      await expect(change, name).rejects.toMatchObject(refusal)
    }
    expect(keys.length).toBeGreaterThan(25)
  })
})
