import type { Answer, Parsed } from '@marram/contract'
import { findAccountById } from '../accounts/accounts'
import { addRole } from '../academies/academies'
import { invite, takeUpInvitation } from '../academies/staff'
import { Problem, notFound } from '../platform/errors'
import { newId } from '../platform/ids'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import type { Coach } from './models'
import { findCoachOf, findCoaches, insertCoach, listCoaches, updateCoach } from './queries'

type CoachView = Answer<'coaches.add'>

export async function readCoaches(
  { db }: Services,
  academyId: string,
): Promise<Answer<'coaches.list'>> {
  return inAcademy(db, academyId, async (trx) => ({
    coaches: (await listCoaches(trx)).map(viewCoach),
  }))
}

/**
 * Adds a coach, with an invitation by mail when an address is given. An owner who adds their own
 * address becomes that coach at once.
 */
export async function addCoach(
  services: Services,
  wanted: { academyId: string; addedBy: string; coach: Parsed<'coaches.add', 'body'> },
): Promise<CoachView> {
  const { name, initials = initialsOf(name), about = '', invite: email } = wanted.coach
  return inAcademy(services.db, wanted.academyId, async (trx) => {
    const now = services.clock.now()
    const id = newId(now)
    const me = await findAccountById(trx, wanted.addedBy)
    const isMe = email !== undefined && me?.email === email
    const isFree = isMe && !(await findCoachOf(trx, wanted.addedBy))
    const accountId = isFree ? wanted.addedBy : null
    await insertCoach(trx, { id, name, initials, about, accountId, createdAt: now })
    if (accountId) await addRole(trx, { accountId, role: 'coach', createdAt: now })
    else if (email) {
      const { academyId, addedBy: invitedBy } = wanted
      await invite(services, trx, { academyId, invitedBy, email, role: 'coach', coachId: id })
    }
    return { id, name, initials, about, accountId }
  })
}

export async function changeCoach(
  { db }: Services,
  wanted: { academyId: string; coachId: string; change: Parsed<'coaches.change', 'body'> },
): Promise<CoachView> {
  return inAcademy(db, wanted.academyId, async (trx) => {
    if (Object.keys(wanted.change).length > 0) {
      await updateCoach(trx, wanted.coachId, wanted.change as Partial<Coach>)
    }
    const [coach] = await findCoaches(trx, [wanted.coachId])
    if (!coach) throw notFound('coach')
    return viewCoach(coach)
  })
}

/** Invites somebody to the staff; a coach as the one of this academy that they are to be. */
export async function inviteStaff(
  services: Services,
  given: { academyId: string; invitedBy: string; wanted: Parsed<'invitations.send', 'body'> },
): Promise<{ id: string }> {
  const { academyId, invitedBy, wanted } = given
  return inAcademy(services.db, academyId, async (trx) => {
    if (wanted.coachId) await checkIsFree(trx, wanted.coachId)
    return invite(services, trx, { ...wanted, academyId, invitedBy })
  })
}

async function checkIsFree(trx: AcademyTrx, coachId: string): Promise<void> {
  const [coach] = await findCoaches(trx, [coachId])
  if (coach?.accountId === null) return
  const sentence = coach
    ? `${coach.name} signs in already.`
    : 'Please choose a coach of this academy.'
  throw new Problem('invalid-fields', sentence, { coachId: sentence })
}

/** Takes an invitation up, and ties the person to the coach that they were invited as. */
export async function acceptInvitation(
  services: Services,
  { secret, accountId }: { secret: string; accountId: string },
): Promise<Answer<'invitations.accept'>> {
  const { slug, role } = await takeUpInvitation(
    services,
    { secret, accountId },
    async (trx, { role, coachId }) => {
      if (role !== 'coach' || (await findCoachOf(trx, accountId))) return
      const [invitedAs] = coachId ? await findCoaches(trx, [coachId]) : []
      // Another invitation for the same coach may have been taken up before this one.
      if (invitedAs?.accountId === null) {
        await updateCoach(trx, invitedAs.id, { accountId })
        return
      }
      const account = await findAccountById(trx, accountId)
      const name = account?.name ?? 'Coach'
      const now = services.clock.now()
      const own = { id: newId(now), name, initials: initialsOf(name), accountId, createdAt: now }
      await insertCoach(trx, own)
    },
  )
  return { slug, role }
}

/** Ties a coach to the account they sign in with. */
export async function tieCoach(
  trx: AcademyTrx,
  { coachId, accountId }: { coachId: string; accountId: string },
): Promise<void> {
  await updateCoach(trx, coachId, { accountId })
}

/** "Aoife Kerrane" is AK; "Sorcha Ní Bhraonáin" is SB. */
export function initialsOf(name: string): string {
  const words = name.split(/\s+/).filter(Boolean)
  const letters = [words[0], words.length > 1 ? words.at(-1) : undefined]
    .map((word) => word?.normalize('NFC').match(/\p{L}/u)?.[0] ?? '')
    .join('')
    .toLocaleUpperCase('en')
  return letters || 'C'
}

function viewCoach({ id, name, initials, about, accountId }: Coach): CoachView {
  return { id, name, initials, about, accountId }
}

export { findCoachOf, findCoaches, listCoaches } from './queries'
export type { Coach } from './models'
