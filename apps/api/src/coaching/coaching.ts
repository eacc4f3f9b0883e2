import type { Answer, Parsed } from '@marram/contract'
import { findReachableSession } from '../clinics/sessions'
import { hasPlaceIn } from '../enrolments/enrolments'
import { Problem } from '../platform/errors'
import { newId } from '../platform/ids'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import type { Swing } from './models'
import { findSwing, insertSwing, listSwings, markSwingRemoved } from './queries'
import { findGolferInReach, findSwingInReach, type SwingReach } from './reach'
import { mayRemove } from './rules'
import { settingsOf } from './settings'
import { columnsOf, viewSwing, type SwingView } from './views'

type NewSwing = Parsed<'swings.record', 'body'>

/**
 * Records a swing of a golfer. One that is sent again under its own id, as after an answer that
 * never arrived, is the one that was recorded then.
 */
export function recordSwing(
  { db, clock }: Services,
  wanted: { reach: SwingReach; golferId: string; swing: NewSwing },
): Promise<SwingView> {
  const { reach, golferId, swing } = wanted
  return inAcademy(db, reach.academyId, async (trx) => {
    await findGolferInReach(trx, { reach, golferId })
    const { sessionId } = swing
    if (sessionId) await checkSession(trx, { reach, golferId, sessionId })
    const { errorDeg } = await settingsOf(trx)
    const now = clock.now()
    const id = swing.id ?? newId(now)
    await insertSwing(trx, {
      id,
      golferId,
      sessionId,
      recordedBy: reach.accountId,
      recordedAt: now,
      ...figuresOf(swing),
      errorDeg: swing.errorDeg ?? errorDeg[swing.method],
    })
    const row = await findSwing(trx, id)
    // A number that somebody else's swing has, or one that was taken out.
    if (row?.golferId !== golferId || row.recordedBy !== reach.accountId) throw alreadyThere()
    return viewSwing(row, reach)
  })
}

const alreadyThere = () =>
  new Problem('already-there', 'Another swing has this number. Record it anew.')

async function checkSession(
  trx: AcademyTrx,
  wanted: { reach: SwingReach; golferId: string; sessionId: string },
): Promise<void> {
  await findReachableSession(trx, wanted)
  if (await hasPlaceIn(trx, wanted)) return
  const sentence = 'This golfer has no place in that session.'
  throw new Problem('invalid-fields', sentence, { sessionId: sentence })
}

function figuresOf({ club, method, wrist, ball, delivery, note }: NewSwing): Partial<Swing> {
  const { start, curve, height, contact, distanceMetres } = ball
  return {
    club,
    method,
    ...columnsOf(wrist),
    ballStart: start,
    ballCurve: curve,
    ballHeight: height,
    contact,
    distanceMetres,
    ...delivery,
    note,
  }
}

const USUAL_PAGE = 20

/** A golfer's swings, newest first, a page at a time. */
export function readSwings(
  { db }: Services,
  wanted: { reach: SwingReach; golferId: string; query: Parsed<'swings.of-golfer', 'query'> },
): Promise<Answer<'swings.of-golfer'>> {
  const { reach, golferId, query } = wanted
  const { limit: asked, club, before } = query
  const limit = asked ? Number(asked) : USUAL_PAGE
  return inAcademy(
    db,
    reach.academyId,
    async (trx) => {
      await findGolferInReach(trx, { reach, golferId })
      // One more than is shown says whether there are others.
      const rows = await listSwings(trx, {
        golferId,
        ...(club ? { club } : {}),
        ...(before ? { before } : {}),
        limit: limit + 1,
      })
      const page = rows.slice(0, limit)
      return {
        swings: page.map((row) => viewSwing(row, reach)),
        next: rows.length > limit ? (page.at(-1)?.id ?? null) : null,
      }
    },
    { readOnly: true },
  )
}

export function readSwing(
  { db }: Services,
  { reach, swingId }: { reach: SwingReach; swingId: string },
): Promise<SwingView> {
  return inAcademy(
    db,
    reach.academyId,
    async (trx) => viewSwing((await findSwingInReach(trx, { reach, swingId })).swing, reach),
    { readOnly: true },
  )
}

/** Takes a swing out that was recorded by mistake. It leaves every list, and its row stays. */
export async function removeSwing(
  { db, clock }: Services,
  { reach, swingId }: { reach: SwingReach; swingId: string },
): Promise<void> {
  await inAcademy(db, reach.academyId, async (trx) => {
    const { swing } = await findSwingInReach(trx, { reach, swingId })
    if (!mayRemove(swing, reach)) {
      throw new Problem('not-allowed', 'Only who recorded this swing, or the owner, removes it.')
    }
    const by = { removedAt: clock.now(), removedBy: reach.accountId }
    await markSwingRemoved(trx, { id: swingId, ...by })
  })
}
