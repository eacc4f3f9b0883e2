import type { Knex } from 'knex'

/** What the tests ask PostgreSQL's own catalogue about our schema. */

export interface Table {
  name: string
  isTenant: boolean
  isNullable: boolean
  isEnabled: boolean
  isForced: boolean
}

export async function listTables(db: Knex): Promise<Table[]> {
  const { rows } = await db.raw<{ rows: Table[] }>(`
    SELECT c.relname AS name, a.attname IS NOT NULL AS is_tenant,
           coalesce(NOT a.attnotnull, false) AS is_nullable,
           c.relrowsecurity AS is_enabled, c.relforcerowsecurity AS is_forced
    FROM pg_class c
    LEFT JOIN pg_attribute a ON a.attrelid = c.oid AND a.attname = 'academy_id'
    WHERE c.relnamespace = 'public'::regnamespace AND c.relkind IN ('r', 'p')
    ORDER BY c.relname`)
  return rows
}

/** Views, and whether they read as whoever asks, so that row-level security is theirs. */
export async function listViews(db: Knex): Promise<{ name: string; readsAsAsker: boolean }[]> {
  const { rows } = await db.raw<{ rows: { name: string; readsAsAsker: boolean }[] }>(`
    SELECT relname AS name,
           coalesce('security_invoker=true' = ANY(reloptions), false) AS reads_as_asker
    FROM pg_class WHERE relnamespace = 'public'::regnamespace AND relkind IN ('v', 'm')`)
  return rows
}

export interface Policy {
  table: string
  name: string
  isPermissive: boolean
  command: string
  roles: string
  using: string | null
  check: string | null
}

export async function listPolicies(db: Knex): Promise<Policy[]> {
  const { rows } = await db.raw<{ rows: Policy[] }>(`
    SELECT tablename AS table, policyname AS name, permissive = 'PERMISSIVE' AS is_permissive,
           cmd AS command, array_to_string(roles, ', ') AS roles, qual AS using,
           with_check AS check
    FROM pg_policies WHERE schemaname = 'public' ORDER BY tablename, policyname`)
  return rows
}

export interface Index {
  table: string
  name: string
  firstColumn: string
}

/** Everything that makes rows unique or keeps them apart: keys, unique indexes, exclusions. */
export async function listKeys(db: Knex): Promise<Index[]> {
  const { rows } = await db.raw<{ rows: Index[] }>(`
    SELECT c.relname AS table, i.relname AS name, pg_get_indexdef(x.indexrelid, 1, true)
           AS first_column
    FROM pg_index x
    JOIN pg_class c ON c.oid = x.indrelid
    JOIN pg_class i ON i.oid = x.indexrelid
    JOIN pg_attribute a ON a.attrelid = c.oid AND a.attname = 'academy_id'
    WHERE c.relnamespace = 'public'::regnamespace
      AND (x.indisunique OR x.indisprimary OR x.indisexclusion)
    ORDER BY c.relname, i.relname`)
  return rows
}

export interface ForeignKey {
  name: string
  from: string
  to: string
  isBetweenTenants: boolean
  columns: string
  referenced: string
  onDelete: string
  /** The columns that ON DELETE SET NULL empties; all of them when it names none. */
  emptied: string
}

export async function listForeignKeys(db: Knex): Promise<ForeignKey[]> {
  const columns = (table: string, numbers: string) => `
    (SELECT string_agg(a.attname, ', ' ORDER BY n.ordinality)
     FROM unnest(${numbers}) WITH ORDINALITY AS n (attnum, ordinality)
     JOIN pg_attribute a ON a.attrelid = ${table} AND a.attnum = n.attnum)`
  const { rows } = await db.raw<{ rows: ForeignKey[] }>(`
    SELECT k.conname AS name, k.conrelid::regclass::text AS from,
           k.confrelid::regclass::text AS to,
           t.attname IS NOT NULL AS is_between_tenants,
           ${columns('k.conrelid', 'k.conkey')} AS columns,
           ${columns('k.confrelid', 'k.confkey')} AS referenced,
           CASE k.confdeltype WHEN 'a' THEN 'no action' WHEN 'r' THEN 'restrict'
             WHEN 'c' THEN 'cascade' WHEN 'n' THEN 'set null' ELSE 'set default' END AS on_delete,
           coalesce(${columns('k.conrelid', 'k.confdelsetcols')},
                    ${columns('k.conrelid', 'k.conkey')}) AS emptied
    FROM pg_constraint k
    JOIN pg_attribute f ON f.attrelid = k.conrelid AND f.attname = 'academy_id'
    LEFT JOIN pg_attribute t ON t.attrelid = k.confrelid AND t.attname = 'academy_id'
    WHERE k.contype = 'f' AND k.connamespace = 'public'::regnamespace
    ORDER BY k.conname`)
  return rows
}

export interface DefinerFunction {
  name: string
  owner: string
  settings: string | null
  isForEverybody: boolean
}

export async function listDefinerFunctions(db: Knex): Promise<DefinerFunction[]> {
  const { rows } = await db.raw<{ rows: DefinerFunction[] }>(`
    SELECT p.proname AS name, r.rolname AS owner, array_to_string(p.proconfig, '; ') AS settings,
           has_function_privilege('public', p.oid, 'EXECUTE') AS is_for_everybody
    FROM pg_proc p JOIN pg_roles r ON r.oid = p.proowner
    WHERE p.pronamespace = 'public'::regnamespace AND p.prosecdef ORDER BY p.proname`)
  return rows
}

/** What a role may do to a table, by any road: the table's or a column's grant, or PUBLIC's. */
export async function listPrivileges(db: Knex, role: string, table: string): Promise<string[]> {
  const { rows } = await db.raw<{ rows: { privilege: string }[] }>(
    `SELECT p AS privilege
     FROM unnest(ARRAY['SELECT', 'INSERT', 'UPDATE', 'DELETE', 'TRUNCATE', 'REFERENCES',
                       'TRIGGER']) WITH ORDINALITY AS o (p, n)
     WHERE has_table_privilege(:role, :table, p)
        OR (p IN ('SELECT', 'INSERT', 'UPDATE', 'REFERENCES')
            AND has_any_column_privilege(:role, :table, p))
     ORDER BY n`,
    { role, table },
  )
  return rows.map(({ privilege }) => privilege)
}
