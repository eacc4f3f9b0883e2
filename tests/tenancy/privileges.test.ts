import type { Knex } from 'knex'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { connect } from '../../apps/api/src/platform/db/connect'
import { takeDatabase, type TestDatabase } from '../support/database'
import { listDefinerFunctions, listPrivileges, listTables } from './catalogue-queries'

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

describe('roles', () => {
  const ours = ['marram_app', 'marram_dispatch']

  it('of the processes have no attribute that reaches around the wall', async () => {
    const { rows } = await db.raw<{ rows: unknown[] }>(
      `SELECT rolname, rolsuper, rolbypassrls, rolcreaterole, rolcreatedb, rolreplication
       FROM pg_roles WHERE rolname = ANY (?) ORDER BY rolname`,
      [ours],
    )
    expect(rows).toEqual(
      ours.map((rolname) => ({
        rolname,
        rolsuper: false,
        rolbypassrls: false,
        rolcreaterole: false,
        rolcreatedb: false,
        rolreplication: false,
      })),
    )
  })

  it('of the processes are members of no other role', async () => {
    const { rows } = await db.raw<{ rows: unknown[] }>(
      `SELECT m.rolname AS member, r.rolname AS of
       FROM pg_auth_members JOIN pg_roles m ON m.oid = member JOIN pg_roles r ON r.oid = roleid
       WHERE m.rolname = ANY (?)`,
      [ours],
    )
    expect(rows).toEqual([])
  })

  it('of the processes own nothing and can make nothing that lasts', async () => {
    const { rows } = await db.raw<{ rows: unknown[] }>(
      `SELECT r.rolname, d.classid::regclass::text AS what, d.objid
       FROM pg_shdepend d JOIN pg_roles r ON r.oid = d.refobjid
       WHERE d.deptype = 'o' AND d.refclassid = 'pg_authid'::regclass AND r.rolname = ANY (:ours)
       UNION ALL
       SELECT r, 'may create in ' || n.nspname, n.oid
       FROM pg_namespace n, unnest((:ours)::text[]) AS r
       WHERE n.nspname !~ '^pg_' AND has_schema_privilege(r, n.oid, 'CREATE')
       UNION ALL
       SELECT r, 'may create schemas', 0 FROM unnest((:ours)::text[]) AS r
       WHERE has_database_privilege(r, current_database(), 'CREATE')`,
      { ours },
    )
    expect(rows).toEqual([])
  })

  it('that see every row cannot sign in', async () => {
    const { rows } = await db.raw<{ rows: unknown[] }>(
      `SELECT rolname, rolcanlogin FROM pg_roles
       WHERE rolname LIKE 'marram%' AND rolbypassrls AND NOT rolsuper`,
    )
    expect(rows).toEqual([{ rolname: 'marram_sees_all', rolcanlogin: false }])
  })
})

describe('privileges', () => {
  const HISTORY = [
    'credit_changes',
    'entries',
    'ledger_accounts',
    'mark_history',
    'minor_look_ups',
    'provider_events',
    'transfers',
  ]

  const DELETABLE = [
    'account_identities',
    'account_links',
    'attempts',
    'clinic_areas',
    'clinic_coaches',
    'clinics',
    'marks',
    'memberships',
    'session_areas',
    'session_coaches',
    'sessions',
    'sign_in_sessions',
  ]

  it.each(HISTORY)('on %s let the app read and add, and change nothing', async (table) => {
    expect(await listPrivileges(db, 'marram_app', table)).toEqual(['SELECT', 'INSERT'])
  })

  it('let the app delete only what it deletes: drafts, and what is set anew', async () => {
    const deletable: string[] = []
    for (const { name } of await listTables(db)) {
      const granted = await listPrivileges(db, 'marram_app', name)
      if (granted.includes('DELETE')) deletable.push(name)
    }
    expect(deletable).toEqual(DELETABLE)
  })

  it('keep the proof of when a transfer was written from the app', async () => {
    const { rows } = await db.raw<{ rows: unknown[] }>(
      `SELECT has_column_privilege('marram_app', 'transfers', 'written_in', 'INSERT') AS can`,
    )
    expect(rows).toEqual([{ can: false }])
  })

  it('never let the app empty a table or hang a trigger on it', async () => {
    for (const { name } of await listTables(db)) {
      const granted = await listPrivileges(db, 'marram_app', name)
      expect({ name, granted }).toEqual({
        name,
        granted: granted.filter((one) => ['SELECT', 'INSERT', 'UPDATE', 'DELETE'].includes(one)),
      })
    }
  })

  it('are granted to roles by name, never to everybody', async () => {
    for (const { name } of await listTables(db)) {
      expect({ name, granted: await listPrivileges(db, 'public', name) }).toEqual({
        name,
        granted: [],
      })
    }
  })
})

describe('functions that see every row', () => {
  it('are few, have a fixed search path and are called by roles that were named', async () => {
    const functions = await listDefinerFunctions(db)
    expect(functions).toEqual(
      [
        'check_transfer',
        'find_academy_by_invitation',
        'find_academy_by_payments_account',
        'find_academy_by_slug',
        'list_memberships_of',
        'list_published_academies',
      ].map((name) => ({
        name,
        owner: 'marram_sees_all',
        settings: 'search_path=pg_catalog, public',
        isForEverybody: false,
      })),
    )
  })

  it('cannot be shown other rows through a temporary table', async () => {
    const app = connect({ url: database.url, poolSize: 1, name: 'tests' })
    try {
      await app.transaction(async (trx) => {
        await trx.raw('CREATE TEMPORARY TABLE academies (slug text, academy_id uuid)')
        await trx.raw(`INSERT INTO pg_temp.academies VALUES ('planted', gen_random_uuid())`)
        const { rows } = await trx.raw<{ rows: unknown[] }>(
          `SELECT find_academy_by_slug('planted') AS found`,
        )
        expect(rows).toEqual([{ found: null }])
      })
    } finally {
      await app.destroy()
    }
  })
})
