import type { SessionReach } from '../clinics/sessions'
import { isInReach } from '../golfers/for-staff'
import { findGolfer, isOwnGolfer, type Golfer } from '../golfers/golfers'
import { notFound } from '../platform/errors'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import { findSwing, type SwingRow } from './queries'

/**
 * Whose swings somebody may see. `staff` by their permission: everybody's, or those of golfers of
 * their own sessions. `golfer`: their own and their dependants', whatever else they are here.
 */
export interface SwingReach extends SessionReach {
  as: 'staff' | 'golfer'
}

export async function findGolferInReach(
  trx: AcademyTrx,
  { reach, golferId }: { reach: SwingReach; golferId: string },
): Promise<Golfer> {
  const golfer = await findGolfer(trx, golferId)
  if (!golfer || !(await isWithin(trx, reach, golfer))) throw notFound('golfer')
  return golfer
}

/** A swing that was not taken out, with whose it is. Out of reach it is as if it were not there. */
export async function findSwingInReach(
  trx: AcademyTrx,
  { reach, swingId }: { reach: SwingReach; swingId: string },
): Promise<{ swing: SwingRow; golfer: Golfer }> {
  const swing = await findSwing(trx, swingId)
  const golfer = swing && (await findGolfer(trx, swing.golferId))
  if (!golfer || !(await isWithin(trx, reach, golfer))) throw notFound('swing')
  return { swing, golfer }
}

async function isWithin(trx: AcademyTrx, reach: SwingReach, golfer: Golfer): Promise<boolean> {
  if (reach.as === 'golfer') return isOwnGolfer(golfer, reach.accountId)
  return isInReach(trx, { reach, golferId: golfer.id })
}
