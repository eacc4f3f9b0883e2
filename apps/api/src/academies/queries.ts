import type { Role } from '@marram/contract'
import { invariant } from '../platform/invariant'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import { Academy, Invitation, MembershipRow } from './models'

/** The academy that the transaction is inside of. */
export async function readAcademy(trx: AcademyTrx): Promise<Academy> {
  const academy = await Academy.query(trx).first()
  invariant(academy, 'the academy of the transaction exists')
  return academy
}

/** Resolves to false when the address belongs to another academy. */
export async function insertAcademy(trx: AcademyTrx, row: Partial<Academy>): Promise<boolean> {
  await Academy.query(trx).insert(row).onConflict('slug').ignore()
  return (await Academy.query(trx).resultSize()) === 1
}

export async function updateAcademy(trx: AcademyTrx, change: Partial<Academy>): Promise<Academy> {
  await Academy.query(trx).patch(change)
  return readAcademy(trx)
}

export async function addRole(
  trx: AcademyTrx,
  row: { accountId: string; role: Role; createdAt: Date },
): Promise<void> {
  await MembershipRow.query(trx)
    .insert(row)
    .onConflict(['academy_id', 'account_id', 'role'])
    .ignore()
}

/** Resolves to how many rows went: 0 or 1. */
export async function removeRole(
  trx: AcademyTrx,
  { accountId, role }: { accountId: string; role: Role },
): Promise<number> {
  return MembershipRow.query(trx).delete().where({ accountId, role })
}

/** Locks the owners, so that two removals at once cannot leave none. */
export async function lockOwners(trx: AcademyTrx): Promise<string[]> {
  const owners = await MembershipRow.query(trx).where({ role: 'owner' }).forUpdate()
  return owners.map(({ accountId }) => accountId)
}

export interface StaffRow {
  accountId: string
  name: string
  email: string
  role: Role
}

export async function listStaff(trx: AcademyTrx): Promise<StaffRow[]> {
  return MembershipRow.query(trx)
    .join('accounts', 'accounts.id', 'memberships.accountId')
    .whereNot('memberships.role', 'golfer')
    .orderBy(['accounts.name', 'memberships.role'])
    .select('memberships.accountId', 'accounts.name', 'accounts.email', 'memberships.role')
    .castTo<StaffRow[]>()
}

export async function insertInvitation(trx: AcademyTrx, row: Partial<Invitation>): Promise<void> {
  await Invitation.query(trx).insert(row)
}

export async function listOpenInvitations(trx: AcademyTrx, now: Date): Promise<Invitation[]> {
  return Invitation.query(trx)
    .whereNull('acceptedAt')
    .where('expiresAt', '>', now)
    .orderBy('createdAt')
}

export async function findInvitation(
  trx: AcademyTrx,
  by: { id: string } | { tokenHash: Buffer },
): Promise<Invitation | undefined> {
  return Invitation.query(trx).where(by).first()
}

export async function setInvitationToken(
  trx: AcademyTrx,
  { id, tokenHash }: { id: string; tokenHash: Buffer },
): Promise<void> {
  await Invitation.query(trx).patch({ tokenHash }).where({ id })
}

/**
 * Ends an open invitation now; false when it was taken up or had ended. It stays written that it was
 * made: it stood until the moment before.
 */
export async function endInvitation(
  trx: AcademyTrx,
  { id, now }: { id: string; now: Date },
): Promise<boolean> {
  const changed = await Invitation.query(trx)
    .patch({ expiresAt: new Date(now.getTime() - 1) })
    .where({ id })
    .whereNull('acceptedAt')
    .where('expiresAt', '>', now)
  return changed === 1
}

/** Uses an invitation up; false when somebody already has, or it was withdrawn meanwhile. */
export async function acceptInvitation(
  trx: AcademyTrx,
  { id, now }: { id: string; now: Date },
): Promise<boolean> {
  const changed = await Invitation.query(trx)
    .patch({ acceptedAt: now })
    .where({ id })
    .whereNull('acceptedAt')
    .where('expiresAt', '>', now)
  return changed === 1
}
