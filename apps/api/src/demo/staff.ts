import type { Role } from '@marram/contract'
import { addRole } from '../academies/academies'
import { tieCoach } from '../coaches/coaches'
import type { Services } from '../platform/services'
import { inAcademy } from '../platform/tenancy/transaction'

/** Gives a demo person their role without the mail that an invitation would send. */
export async function joinStaff(
  { db, clock }: Services,
  given: {
    academyId: string
    accountId: string
    role: Exclude<Role, 'golfer'>
    coachId: string | null
  },
): Promise<void> {
  const { accountId, role, coachId } = given
  await inAcademy(db, given.academyId, async (trx) => {
    await addRole(trx, { accountId, role, createdAt: clock.now() })
    if (coachId) await tieCoach(trx, { coachId, accountId })
  })
}
