import type { Answer } from '@marram/contract'
import type { Swing, SwingTarget } from './models'
import type { SwingRow, TargetRow } from './queries'
import type { SwingReach } from './reach'
import { mayRemove } from './rules'

export type SwingView = Answer<'swings.read'>
export type TargetView = Answer<'targets.read'>['targets'][number]

export function viewSwing(row: SwingRow, reach: SwingReach): SwingView {
  const { ballStart: start, ballCurve: curve, ballHeight: height, contact } = row
  const { faceDeg, pathDeg, attackDeg, speedMps } = row
  return {
    id: row.id,
    golferId: row.golferId,
    sessionId: row.sessionId,
    recordedAt: row.recordedAt.toISOString(),
    recordedBy: row.recorderName,
    mayRemove: mayRemove(row, reach),
    club: row.club,
    method: row.method,
    errorDeg: row.errorDeg,
    wrist: trackOf(row),
    ball: { start, curve, height, contact, distanceMetres: row.distanceMetres },
    delivery: { faceDeg, pathDeg, attackDeg, speedMps },
    note: row.note,
  }
}

export function viewTarget(row: TargetRow): TargetView {
  const { club, setterName: setBy } = row
  return { club, wrist: trackOf(row), setBy, setAt: row.setAt.toISOString() }
}

/** The six columns as three moments. */
function trackOf<Row extends Swing | SwingTarget>(row: Row) {
  type Angle = Row['topUlnarDeg']
  const at = (flexionDeg: Angle, ulnarDeg: Angle) => ({ flexionDeg, ulnarDeg })
  return {
    address: at(row.addressFlexionDeg, row.addressUlnarDeg),
    top: at(row.topFlexionDeg, row.topUlnarDeg),
    impact: at(row.impactFlexionDeg, row.impactUlnarDeg),
  }
}

type Moment = 'address' | 'top' | 'impact'

/** Three moments as the six columns. */
export function columnsOf<Angle extends number | null>(
  track: Record<Moment, { flexionDeg: Angle; ulnarDeg: Angle }>,
) {
  const { address, top, impact } = track
  return {
    addressFlexionDeg: address.flexionDeg,
    addressUlnarDeg: address.ulnarDeg,
    topFlexionDeg: top.flexionDeg,
    topUlnarDeg: top.ulnarDeg,
    impactFlexionDeg: impact.flexionDeg,
    impactUlnarDeg: impact.ulnarDeg,
  }
}
