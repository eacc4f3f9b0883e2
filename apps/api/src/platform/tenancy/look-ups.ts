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
