import type { Knex } from 'knex'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { connect } from '../../apps/api/src/platform/db/connect'
import { takeDatabase, type TestDatabase } from '../support/database'
import {
  listForeignKeys,
  listKeys,
  listPolicies,
  listPrivileges,
  listTables,
  listViews,
} from './catalogue-queries'

/** Tables that belong to no academy. A new table without `academy_id` has to be argued for here. */
const REFERENCE_TABLES = [
  // A person is known before any academy is.
  'account_identities',
  'account_links',
  'account_mails',
  'accounts',
  'sign_in_sessions',
  // Counted by address, deduplicated by the provider's id, silenced for everybody.
  'attempts',
  'provider_events',
  'silenced_addresses',
  // The migrations' own.
  'schema_migrations',
  'schema_migrations_lock',
]

/** Unique across academies on purpose: by these an academy is found before it is known. */
const GLOBAL_KEYS = ['academies_payments_account_key', 'academies_slug_key']

/** What the dispatcher may see of every academy: what is due. */
const DISPATCHER_TABLES = ['enrolments', 'owed_places', 'refunds']

const OWN_ACADEMY =
  "(academy_id = (NULLIF(current_setting('app.academy_id'::text, true), ''::text))::uuid)"

let database: TestDatabase
let db: Knex

beforeAll(async () => {
  database = await takeDatabase()
  db = connect({ url: database.superuserUrl, poolSize: 1, name: 'tests' })
})
afterAll(async () => {
  await db.destroy()
  await database.drop()
})

describe('tables', () => {
  it('belong to an academy, or to a list with a reason', async () => {
    const tables = await listTables(db)
    const others = tables.filter(({ isTenant }) => !isTenant).map(({ name }) => name)
    expect(others.sort()).toEqual([...REFERENCE_TABLES].sort())
    expect(tables.length - others.length).toBeGreaterThanOrEqual(29)
    expect(tables.filter(({ isNullable }) => isNullable)).toEqual([])
  })

  it('are read through views only as whoever asks', async () => {
    const views = await listViews(db)
    expect(views).toContainEqual({ name: 'owed_at_desk', readsAsAsker: true })
    expect(views.filter(({ readsAsAsker }) => !readsAsAsker)).toEqual([])
  })

  it('of an academy have row-level security, enabled and forced', async () => {
    const tenants = (await listTables(db)).filter(({ isTenant }) => isTenant)
    expect(tenants.filter(({ isEnabled, isForced }) => !isEnabled || !isForced)).toEqual([])
  })

  it('of an academy have one policy for everybody, for reading and for writing', async () => {
    const policies = (await listPolicies(db)).filter(({ name }) => name !== 'due')
    const tenants = (await listTables(db)).filter(({ isTenant }) => isTenant)
    expect(policies).toEqual(
      tenants.map(({ name: table }) => ({
        table,
        name: 'own_academy',
        isPermissive: true,
        command: 'ALL',
        roles: 'public',
        using: OWN_ACADEMY,
        check: OWN_ACADEMY,
      })),
    )
  })

  it('open to the dispatcher only where something can be due, and only for reading', async () => {
    const policies = (await listPolicies(db)).filter(({ name }) => name === 'due')
    expect(policies.map(({ table }) => table)).toEqual(DISPATCHER_TABLES)
    for (const policy of policies) {
      expect(policy).toMatchObject({ command: 'SELECT', roles: 'marram_dispatch' })
      expect(await listPrivileges(db, 'marram_dispatch', policy.table)).toEqual(['SELECT'])
    }
  })

  it('are not looked at through a view that sees more than its reader', async () => {
    const { rows } = await db.raw<{ rows: unknown[] }>(`
      SELECT relname FROM pg_class
      WHERE relnamespace = 'public'::regnamespace
        AND (relkind = 'm' OR (relkind = 'v'
             AND NOT coalesce('security_invoker=true' = ANY (reloptions), false)))`)
    expect(rows).toEqual([])
  })
})

describe('keys', () => {
  it('start with the academy', async () => {
    const keys = await listKeys(db)
    const others = keys.filter(({ firstColumn }) => firstColumn !== 'academy_id')
    expect(others.map(({ name }) => name)).toEqual(GLOBAL_KEYS)
    expect(keys.length).toBeGreaterThan(40)
  })

  it('between tables of academies start with the academy on both sides', async () => {
    const between = (await listForeignKeys(db)).filter((key) => key.isBetweenTenants)
    const isApart = ({ columns, referenced }: { columns: string; referenced: string }) =>
      /^academy_id\b/.test(columns) && /^academy_id\b/.test(referenced)
    expect(between.filter((key) => !isApart(key))).toEqual([])
    expect(between.length).toBeGreaterThan(30)
  })

  it('to reference tables are plain ones', async () => {
    const plain = (await listForeignKeys(db)).filter((key) => !key.isBetweenTenants)
    expect(new Set(plain.map(({ to }) => to))).toEqual(new Set(['accounts']))
    expect(plain.filter(({ columns }) => columns.includes(','))).toEqual([])
  })
})
