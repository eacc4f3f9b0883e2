export { airDensityKgM3, standardCelsius, type Air } from './air'
export { BALL_MODELS, FITTED_BALL, TUNNEL_BALL, type BallModel } from './ball-models'
export { flightBand, isSettled, mirrored, type Band, type FlightBand } from './bands'
export {
  USUAL_ERROR_DEG,
  changeOf,
  type Against,
  type Change,
  type Method,
  type Readings,
} from './change'
export { CLUBS, type Club, type ClubName } from './clubs'
export {
  POSITIONS,
  USUAL_TOLERANCE_DEG,
  WRIST_LIMITS,
  areComparable,
  matchUpOf,
  type MatchUp,
  type MatchUpThresholds,
  type Position,
  type WristTrack,
} from './comparable'
export { ellipseOf, limitsOf, type Ellipse, type Limits, type Shot } from './dispersion'
export { flightOf, type Flight, type FlightOptions, type FlightPoint } from './flight'
export {
  HIGHEST_HANDICAP,
  capRise,
  courseHandicapOf,
  differentialOf,
  exceptionalReduction,
  handicapFrom,
  toTenth,
  type Score,
} from './handicap'
export {
  BALL_KG,
  BALL_RADIUS_METRES,
  launchOf,
  type ClubHead,
  type Delivery,
  type Launch,
} from './impact'
export { fromFahrenheit, fromMph, fromYards, toFahrenheit, toMph, toYards } from './units'
export {
  USUAL_GRIP,
  faceAfter,
  forearmShaftAngleDeg,
  splitExtension,
  type Face,
  type FaceBand,
  type Grip,
  type WristAngles,
  type WristChange,
} from './wrist'
