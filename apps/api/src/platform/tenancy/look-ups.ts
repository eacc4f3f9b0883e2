import type { Role } from '@marram/contract'
import type { Knex } from 'knex'

/**
 * The only questions that may be asked before an academy is known. Each is a database function
 * that sees every academy and answers with no more than this.
 */

export async function findAcademyBySlug(db: Knex, slug: string): Promise<string | null> {
  const { rows } = await db.raw<{ rows: { id: string | null }[] }>(
    'SELECT find_academy_by_slug(?) AS id',
    [slug],
  )
  return rows[0]?.id ?? null
}

export async function findAcademyByPaymentsAccount(
  db: Knex,
  account: string,
): Promise<string | null> {
  const { rows } = await db.raw<{ rows: { id: string | null }[] }>(
    'SELECT find_academy_by_payments_account(?) AS id',
    [account],
  )
  return rows[0]?.id ?? null
}

export async function findAcademyByInvitation(db: Knex, hash: Buffer): Promise<string | null> {
  const { rows } = await db.raw<{ rows: { id: string | null }[] }>(
    'SELECT find_academy_by_invitation(?) AS id',
    [hash],
  )
  return rows[0]?.id ?? null
}

export interface Membership {
  slug: string
  name: string
  accent: string
  accentDusk: string
  role: Role
}

/** Every role of a person, in every academy, by the academy's name. */
export async function listMembershipsOf(db: Knex, accountId: string): Promise<Membership[]> {
  const { rows } = await db.raw<{ rows: Membership[] }>('SELECT * FROM list_memberships_of(?)', [
    accountId,
  ])
  return rows
}

export interface CallerRow {
  id: string
  name: string
  email: string
  isVerified: boolean
  hasPassword: boolean
  sessionVersion: number
  /** The academy of the address; null for an address that is none. */
  academyId: string | null
  /** The person's roles in that academy. */
  roles: Role[]
}

/** Who calls, where, and with which roles there: what every signed-in request asks, asked once. */
export async function findCaller(
  db: Knex,
  { accountId, slug }: { accountId: string; slug: string | null },
): Promise<CallerRow | undefined> {
  const { rows } = await db
    .raw<{ rows: CallerRow[] }>(
      `SELECT a.id, a.name, a.email, a.email_verified_at IS NOT NULL AS is_verified,
         a.password_hash IS NOT NULL AS has_password, a.session_version,
         find_academy_by_slug(:slug) AS academy_id,
         (SELECT coalesce(array_agg(m.role), '{}') FROM list_memberships_of(a.id) m
            WHERE m.slug = :slug) AS roles
       FROM accounts a WHERE a.id = :accountId`,
      { accountId, slug },
    )
    .options({ name: 'caller' })
  return rows[0]
}

export interface PublishedAcademy {
  slug: string
  name: string
  place: string
  accent: string
}

export async function listPublishedAcademies(db: Knex): Promise<PublishedAcademy[]> {
  const { rows } = await db.raw<{ rows: PublishedAcademy[] }>(
    'SELECT * FROM list_published_academies()',
  )
  return rows
}
