import {
  USUAL_ERROR_DEG,
  USUAL_TOLERANCE_DEG,
  type ClubName,
  type MatchUpThresholds,
  type Method,
} from '@marram/swing'

/** How an academy reads swings. */
export interface Settings {
  toleranceDeg: number
  errorDeg: Record<Method, number>
  matchUp: MatchUpThresholds
}

/** Where academies start. The match-up's halves are common practice, without a published source. */
export const STARTING_SETTINGS: Settings = {
  toleranceDeg: USUAL_TOLERANCE_DEG,
  errorDeg: { ...USUAL_ERROR_DEG },
  matchUp: { extensionOutDeg: 20, radialBackDeg: 15 },
}

/** How a club comes to the ball where nobody measured it. */
export interface UsualDelivery {
  speedMps: number
  attackDeg: number
  pathDeg: number
}

/**
 * A club golfer's delivery, in metres a second and degrees: common practice, without a published
 * source. It stands in for what was not measured, in both swings alike, and the answer says so.
 */
export const USUAL_DELIVERY: Readonly<Record<ClubName, UsualDelivery>> = {
  driver: { speedMps: 42, attackDeg: 0, pathDeg: 0 },
  'fairway-wood': { speedMps: 40, attackDeg: -2, pathDeg: 0 },
  '5-iron': { speedMps: 36, attackDeg: -3, pathDeg: 0 },
  '7-iron': { speedMps: 34, attackDeg: -4, pathDeg: 0 },
  '9-iron': { speedMps: 32, attackDeg: -4, pathDeg: 0 },
  'pitching-wedge': { speedMps: 31, attackDeg: -4, pathDeg: 0 },
  'sand-wedge': { speedMps: 29, attackDeg: -4, pathDeg: 0 },
}
