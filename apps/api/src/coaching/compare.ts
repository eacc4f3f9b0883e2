import type { Answer, Parsed } from '@marram/contract'
import type { Golfer } from '../golfers/golfers'
import { Problem, notFound } from '../platform/errors'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import type { Settings } from './defaults'
import type { SwingRow } from './queries'
import { findSwingInReach, type SwingReach } from './reach'
import {
  addressDifference,
  differencesOf,
  halvesAimedAt,
  halvesOf,
  inOrder,
  targetFor,
  whole,
  whyNotComparable,
  type Measure,
} from './rules'
import { settingsOf } from './settings'
import { targetsOf } from './targets'
import { viewSwing, type SwingView } from './views'
import { workOut, type Side } from './worked-out'

type Comparison = Answer<'swings.compare'>

interface Compared {
  from: Comparison['from']
  to: SwingView
  golfer: Golfer
}

/**
 * Compares a swing with another of the same golfer's, the earlier first, or with what the golfer
 * aims at: whether they compare at all, what changed, and what it does to the face and the ball.
 */
export async function compareSwing(
  { db }: Services,
  wanted: { reach: SwingReach; swingId: string; query: Parsed<'swings.compare', 'query'> },
): Promise<Comparison> {
  const { reach, swingId, query } = wanted
  const read = async (trx: AcademyTrx): Promise<[Compared, Settings]> => {
    const { swing, golfer } = await findSwingInReach(trx, { reach, swingId })
    const compared =
      query.with === 'target'
        ? await againstTarget(trx, { reach, swing, golfer })
        : await againstSwing(trx, { reach, swing, golfer, otherId: query.with })
    return [compared, await settingsOf(trx)]
  }
  // What is worked out takes a while; no connection need wait for it.
  return viewComparison(...(await inAcademy(db, reach.academyId, read, { readOnly: true })))
}

async function againstTarget(
  trx: AcademyTrx,
  { reach, swing, golfer }: { reach: SwingReach; swing: SwingRow; golfer: Golfer },
): Promise<Compared> {
  const target = targetFor(await targetsOf(trx, golfer.id), swing.club)
  if (!target) throw notFound('target')
  return { from: { kind: 'target', target }, to: viewSwing(swing, reach), golfer }
}

async function againstSwing(
  trx: AcademyTrx,
  given: { reach: SwingReach; swing: SwingRow; golfer: Golfer; otherId: string },
): Promise<Compared> {
  const { reach, swing, golfer, otherId } = given
  const { swing: other } = await findSwingInReach(trx, { reach, swingId: otherId })
  if (other.id === swing.id) throw refuseWith('Choose another swing to compare this one with.')
  if (other.golferId !== golfer.id) throw refuseWith('These are swings of two golfers.')
  const [earlier, later] = inOrder(swing, other)
  const from = { kind: 'swing', swing: viewSwing(earlier, reach) } as const
  return { from, to: viewSwing(later, reach), golfer }
}

const refuseWith = (sentence: string) => new Problem('invalid-fields', sentence, { with: sentence })

function viewComparison(
  { from, to, golfer }: Compared,
  { toleranceDeg, matchUp }: Settings,
): Comparison {
  const measure: Measure = from.kind === 'swing' ? from.swing : { ...from.target, errorDeg: null }
  const whyNot = whyNotComparable({ from: measure, to, toleranceDeg })
  const isComparable = whyNot.length === 0
  const sides = sidesOf({ from, to })
  return {
    from,
    to,
    address: { ...addressDifference({ from: measure.wrist, to: to.wrist }), toleranceDeg },
    isComparable,
    whyNot,
    differences: isComparable ? differencesOf({ from: measure, to }) : null,
    matchUp: { from: halvesAimedAt(measure.wrist, matchUp), to: halvesOf(to.wrist, matchUp) },
    workedOut:
      isComparable && sides ? workOut({ ...sides, club: to.club, hand: golfer.hand }) : null,
  }
}

const NOTHING_MEASURED = { faceDeg: null, pathDeg: null, attackDeg: null, speedMps: null }

/** What is worked out needs both wrists at impact, of which a target may say nothing. */
function sidesOf({ from, to }: Pick<Compared, 'from' | 'to'>): { from: Side; to: Side } | null {
  const { wrist, delivery } =
    from.kind === 'swing' ? from.swing : { ...from.target, delivery: NOTHING_MEASURED }
  const impact = whole(wrist.impact)
  return impact && { from: { impact, delivery }, to: { ...to, impact: to.wrist.impact } }
}
