import type { Knex } from 'knex'

/** The roles of the database. They belong to the cluster, so several databases share them. */
export interface RolePasswords {
  owner: string
  app: string
  dispatch: string
}

/**
 * Makes or refreshes the roles, as the cluster's superuser. `marram_owner` migrates; `marram_app`
 * owns nothing and cannot bypass row-level security; `marram_dispatch` sees what is due;
 * `marram_sees_all` cannot sign in and owns the few functions that must see every row.
 */
export async function makeRoles(superuser: Knex, passwords: RolePasswords): Promise<void> {
  await superuser.transaction(async (trx) => {
    // Several test processes may come at once; roles are the cluster's, so they take turns.
    await trx.raw('SELECT pg_advisory_xact_lock(4310)')
    await makeRole(trx, 'marram_owner', `LOGIN NOBYPASSRLS PASSWORD '${quoted(passwords.owner)}'`)
    await makeRole(trx, 'marram_app', `LOGIN NOBYPASSRLS PASSWORD '${quoted(passwords.app)}'`)
    await makeRole(
      trx,
      'marram_dispatch',
      `LOGIN NOBYPASSRLS PASSWORD '${quoted(passwords.dispatch)}'`,
    )
    await makeRole(trx, 'marram_sees_all', 'NOLOGIN BYPASSRLS')
    await trx.raw('GRANT marram_sees_all TO marram_owner')
  })
}

async function makeRole(trx: Knex, name: string, attributes: string): Promise<void> {
  const { rows } = await trx.raw<{ rows: unknown[] }>('SELECT 1 FROM pg_roles WHERE rolname = ?', [
    name,
  ])
  const isThere = rows.length > 0
  await trx.raw(`${isThere ? 'ALTER' : 'CREATE'} ROLE ${name} NOSUPERUSER ${attributes}`)
}

function quoted(secret: string): string {
  return secret.replaceAll("'", "''")
}

/** Makes a database that `marram_owner` owns, unless it is there; with the extension it needs. */
export async function makeDatabase(superuser: Knex, name: string): Promise<{ isNew: boolean }> {
  const { rows } = await superuser.raw<{ rows: unknown[] }>(
    'SELECT 1 FROM pg_database WHERE datname = ?',
    [name],
  )
  if (rows.length > 0) return { isNew: false }
  await superuser.raw(
    `CREATE DATABASE "${name}" OWNER marram_owner ENCODING 'UTF8' TEMPLATE template0`,
  )
  return { isNew: true }
}

/** Inside a new database, as the superuser: what an ordinary owner may not do. */
export async function prepareDatabase(superuserThere: Knex): Promise<void> {
  await superuserThere.raw('CREATE EXTENSION IF NOT EXISTS btree_gist')
  await superuserThere.raw('REVOKE ALL ON SCHEMA public FROM PUBLIC')
  await superuserThere.raw('ALTER SCHEMA public OWNER TO marram_owner')
  await superuserThere.raw('GRANT USAGE, CREATE ON SCHEMA public TO marram_sees_all')
}
