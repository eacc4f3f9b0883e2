import {
  CLUBS,
  USUAL_GRIP,
  airDensityKgM3,
  faceAfter,
  flightBand,
  launchOf,
  mirrored,
  type Air,
  type ClubName,
  type Face,
  type FaceBand,
  type FlightBand,
  type WristAngles,
} from '@marram/swing'
import { USUAL_DELIVERY, type UsualDelivery } from './defaults'

/** One of the two that are compared: its wrist at impact, and what was measured of the club. */
export interface Side {
  impact: WristAngles
  delivery: { [Part in 'faceDeg' | keyof UsualDelivery]: number | null }
}

export interface WorkedOut {
  anchoredTo: 'from' | 'to' | 'square'
  assumed: ('path' | 'attack' | 'speed')[]
  face: { from: FaceBand; to: FaceBand }
  flight: { from: FlightBand; to: FlightBand }
}

type Hand = 'right' | 'left'
interface Pair {
  from: Side
  to: Side
  club: ClubName
}

/**
 * What two wrists at impact do to the face and the ball, other things being equal. The face of one
 * is known, measured or taken as square; the other's follows from it in both bounding cases, and
 * each flight is a band over these and both ball models, in still air at sea level.
 *
 * Everything comes in for the golfer's own hand and is worked out as a right-hander's; directions of
 * the flight go out as seen, right of the target positive.
 */
export function workOut({ hand, ...pair }: Pair & { hand: Hand }): WorkedOut {
  const { anchoredTo, ...face } = facesOf(pair)
  const { from, to, club } = pair
  const fly = (side: Side, other: Side, faces: FaceBand) =>
    flightFrom(faces, {
      club,
      hand,
      faceDeg: side.delivery.faceDeg,
      ...deliveryOf(pair, side, other),
    })
  return {
    anchoredTo,
    assumed: assumedOf(pair),
    face,
    flight: { from: fly(from, to, face.from), to: fly(to, from, face.to) },
  }
}

/** Where only the later face was measured, the earlier one follows from it. */
function facesOf({ from, to, club }: Pair): WorkedOut['face'] & Pick<WorkedOut, 'anchoredTo'> {
  const { loftDeg, lieDeg } = CLUBS[club]
  const measured = from.delivery.faceDeg ?? to.delivery.faceDeg
  const known: Face = { openDeg: measured ?? 0, loftDeg }
  const anchor: FaceBand = { forearmFixed: known, leanHeld: known }
  const after = (first: Side, second: Side) =>
    faceAfter({ from: first.impact, to: second.impact, grip: USUAL_GRIP, lieDeg, face: known })
  if (from.delivery.faceDeg === null && measured !== null) {
    return { anchoredTo: 'to', from: after(to, from), to: anchor }
  }
  const anchoredTo = measured === null ? 'square' : 'from'
  return { anchoredTo, from: anchor, to: after(from, to) }
}

/** What was not measured in one is as in the other, and as usual where it was measured in neither. */
function deliveryOf({ club }: Pair, { delivery: own }: Side, { delivery: other }: Side) {
  const usual = USUAL_DELIVERY[club]
  return {
    pathDeg: own.pathDeg ?? other.pathDeg ?? usual.pathDeg,
    attackDeg: own.attackDeg ?? other.attackDeg ?? usual.attackDeg,
    speedMps: own.speedMps ?? other.speedMps ?? usual.speedMps,
  }
}

function assumedOf({ from, to }: Pair): WorkedOut['assumed'] {
  const isUnknown = (part: keyof UsualDelivery) =>
    from.delivery[part] === null && to.delivery[part] === null
  return [
    ...(isUnknown('pathDeg') ? ['path' as const] : []),
    ...(isUnknown('attackDeg') ? ['attack' as const] : []),
    ...(isUnknown('speedMps') ? ['speed' as const] : []),
  ]
}

const STILL_AIR: Air = {
  densityKgM3: airDensityKgM3({ altitudeMetres: 0 }),
  windAlongMps: 0,
  windRightMps: 0,
}

function flightFrom(
  faces: FaceBand,
  given: UsualDelivery & { club: ClubName; hand: Hand; faceDeg: number | null },
): FlightBand {
  const { club, hand, faceDeg, ...delivery } = given
  const launches = [faces.forearmFixed, faces.leanHeld].map(({ openDeg, loftDeg }) =>
    // What was measured of this face outranks what the other's would make of it.
    launchOf({ ...delivery, faceDeg: faceDeg ?? openDeg, loftDeg }, CLUBS[club]),
  )
  const flight = flightBand(launches, STILL_AIR)
  // The one place where a left-hander's ball is turned.
  return hand === 'left' ? mirrored(flight) : flight
}
