import type { Answer, Parsed } from '@marram/contract'
import { newId } from '../platform/ids'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { listTargets, setTarget } from './queries'
import { findGolferInReach, type SwingReach } from './reach'
import { isAim } from './rules'
import { columnsOf, viewTarget, type TargetView } from './views'

type TargetList = Answer<'targets.read'>

export function readTargets(
  { db }: Services,
  { reach, golferId }: { reach: SwingReach; golferId: string },
): Promise<TargetList> {
  return inAcademy(
    db,
    reach.academyId,
    async (trx) => {
      await findGolferInReach(trx, { reach, golferId })
      return { targets: await targetsOf(trx, golferId) }
    },
    { readOnly: true },
  )
}

/** Sets what a golfer aims at with a club, or with all that have no target of their own. */
export function setSwingTarget(
  { db, clock }: Services,
  wanted: { reach: SwingReach; golferId: string; target: Parsed<'targets.set', 'body'> },
): Promise<TargetList> {
  const { reach, golferId, target } = wanted
  return inAcademy(db, reach.academyId, async (trx) => {
    await findGolferInReach(trx, { reach, golferId })
    const now = clock.now()
    await setTarget(trx, {
      id: newId(now),
      golferId,
      club: target.club,
      ...columnsOf(target.wrist),
      setBy: reach.accountId,
      setAt: now,
    })
    return { targets: await targetsOf(trx, golferId) }
  })
}

/** What a golfer aims at. A target of which every angle was left open is none. */
export async function targetsOf(trx: AcademyTrx, golferId: string): Promise<TargetView[]> {
  const targets = (await listTargets(trx, golferId)).map(viewTarget)
  return targets.filter(({ wrist }) => isAim(wrist))
}
