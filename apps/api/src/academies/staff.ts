import type { Answer, Parsed, Role } from '@marram/contract'
import { findAccountById } from '../accounts/accounts'
import { Problem, notFound } from '../platform/errors'
import { hashSecret, newId, newSecret } from '../platform/ids'
import type { Services } from '../platform/services'
import { findAcademyByInvitation } from '../platform/tenancy/look-ups'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { INVITATION_DAYS } from './defaults'
import type { Invitation } from './models'
import {
  acceptInvitation,
  addRole,
  endInvitation,
  findInvitation,
  insertInvitation,
  listOpenInvitations,
  listStaff,
  lockOwners,
  readAcademy,
  removeRole,
  setInvitationToken,
} from './queries'

export async function readStaff(
  { db, clock }: Services,
  academyId: string,
): Promise<Answer<'staff.list'>> {
  return inAcademy(db, academyId, async (trx) => {
    const rows = await listStaff(trx)
    const people = new Map<string, Answer<'staff.list'>['staff'][number]>()
    for (const { role, ...person } of rows) {
      const roles: Role[] = people.get(person.accountId)?.roles ?? []
      people.set(person.accountId, { ...person, roles: [...roles, role] })
    }
    const invitations = await listOpenInvitations(trx, clock.now())
    return {
      staff: [...people.values()],
      invitations: invitations.map(({ id, email, role, expiresAt }) => ({
        id,
        email,
        role,
        expiresAt: expiresAt.toISOString(),
      })),
    }
  })
}

/** Takes a role away. An academy always keeps one owner. */
export async function removeStaff(
  { db }: Services,
  wanted: { academyId: string; accountId: string; role: Role },
): Promise<void> {
  await inAcademy(db, wanted.academyId, async (trx) => {
    if (wanted.role === 'owner') {
      const owners = await lockOwners(trx)
      if (owners.length === 1 && owners[0] === wanted.accountId) {
        throw new Problem('not-allowed', 'An academy needs an owner. Invite another one first.')
      }
    }
    if ((await removeRole(trx, wanted)) === 0) throw notFound('member of staff')
  })
}

/** Invites somebody by mail. Inside the caller's transaction, so that a coach and the mail go together. */
export async function invite(
  services: Services,
  trx: AcademyTrx,
  wanted: Parsed<'invitations.send', 'body'> & { academyId: string; invitedBy: string },
): Promise<{ id: string }> {
  const now = services.clock.now()
  const id = newId(now)
  await insertInvitation(trx, {
    id,
    email: wanted.email,
    role: wanted.role,
    coachId: wanted.coachId ?? null,
    invitedBy: wanted.invitedBy,
    // Replaced by the hash of the link's secret when the mail is written.
    tokenHash: hashSecret(newSecret()),
    expiresAt: new Date(now.getTime() + INVITATION_DAYS * 86_400_000),
    createdAt: now,
  })
  const made = { academyId: wanted.academyId, invitationId: id }
  await services.outbox.emit(trx, 'invitation.made', made)
  return { id }
}

/** Takes an invitation back that nobody took up yet: its link opens nothing any more. */
export async function withdrawInvitation(
  { db, clock }: Services,
  { academyId, invitationId }: { academyId: string; invitationId: string },
): Promise<void> {
  const isWithdrawn = await inAcademy(db, academyId, (trx) =>
    endInvitation(trx, { id: invitationId, now: clock.now() }),
  )
  if (!isWithdrawn) throw notFound('invitation')
}

/** Makes the link that the mail carries. Null when the invitation has ended meanwhile. */
export async function makeInvitationLink(
  { db, clock }: Services,
  { academyId, invitationId }: { academyId: string; invitationId: string },
): Promise<{ invitation: Invitation; academyName: string; secret: string } | null> {
  return inAcademy(db, academyId, async (trx) => {
    const invitation = await findInvitation(trx, { id: invitationId })
    if (!invitation || !isOpen(invitation, clock.now())) return null
    const secret = newSecret()
    await setInvitationToken(trx, { id: invitationId, tokenHash: hashSecret(secret) })
    const { name } = await readAcademy(trx)
    return { invitation, academyName: name, secret }
  })
}

const isOpen = (invitation: Invitation, now: Date): boolean =>
  invitation.acceptedAt === null && now <= invitation.expiresAt

export async function readInvitation(
  services: Services,
  secret: string,
): Promise<Answer<'invitations.read'>> {
  return inInvitation(services, secret, async (trx, { email, role }) => {
    const { name } = await readAcademy(trx)
    return { academyName: name, role, email }
  })
}

export interface Accepted {
  slug: string
  role: Exclude<Role, 'golfer'>
  coachId: string | null
}

/**
 * Takes an invitation up. It is for the invited address: the account must have it, and have
 * confirmed it or come by this very link, which went to that mailbox.
 */
export async function takeUpInvitation(
  services: Services,
  { secret, accountId }: { secret: string; accountId: string },
  alsoDo: (trx: AcademyTrx, accepted: Accepted) => Promise<void>,
): Promise<Accepted> {
  return inInvitation(services, secret, async (trx, invitation) => {
    const account = await findAccountById(trx, accountId)
    if (account?.email !== invitation.email) {
      throw new Problem('not-allowed', `This invitation is for ${invitation.email}.`)
    }
    const now = services.clock.now()
    if (!(await acceptInvitation(trx, { id: invitation.id, now }))) throw linkGone()
    await addRole(trx, { accountId, role: invitation.role, createdAt: now })
    const { slug } = await readAcademy(trx)
    const accepted = { slug, role: invitation.role, coachId: invitation.coachId }
    await alsoDo(trx, accepted)
    return accepted
  })
}

const linkGone = () =>
  new Problem('link-not-valid', 'This invitation was used or is too old. Ask for a new one.')

async function inInvitation<T>(
  { db, clock }: Services,
  secret: string,
  work: (trx: AcademyTrx, invitation: Invitation) => Promise<T>,
): Promise<T> {
  const tokenHash = hashSecret(secret)
  const academyId = await findAcademyByInvitation(db, tokenHash)
  if (!academyId) throw linkGone()
  return inAcademy(db, academyId, async (trx) => {
    const invitation = await findInvitation(trx, { tokenHash })
    if (!invitation || !isOpen(invitation, clock.now())) throw linkGone()
    return work(trx, invitation)
  })
}

export { INVITATION_DAYS } from './defaults'
