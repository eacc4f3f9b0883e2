/**
 * What air does to a golf ball, as coefficients of ½ρV²A. S is the spin ratio ωr/V; drag and lift
 * are published fits and measurements, and differ from ball to ball by about a tenth in carry.
 */
export interface BallModel {
  name: string
  /** Where the source measured; outside it the figures are a guess, and bands grow. */
  speedMps: readonly [least: number, most: number]
  spinRatio: readonly [least: number, most: number]
  drag: (speedMps: number, spinRatio: number) => number
  lift: (speedMps: number, spinRatio: number) => number
  /** Of the moment that slows the spin. */
  moment: (spinRatio: number) => number
}

const momentOf = (spinRatio: number): number => 0.0125 * spinRatio

/** A ball without spin has no lift, although the fit's line would not go through nothing. */
const LIFT_BEGINS = 0.05

/**
 * Quintavalla's fit, from full-swing speeds: CD = 0.171 + 0.62 S, CL = 0.083 + 0.885 S,
 * Cm = 0.0125 S. Under S = 0.05 the lift is brought to nothing in proportion.
 */
export const FITTED_BALL: BallModel = {
  name: 'a fit to full-swing speeds',
  speedMps: [40, 85],
  spinRatio: [LIFT_BEGINS, 0.3],
  drag: (_, spinRatio) => 0.171 + 0.62 * spinRatio,
  lift: (_, spinRatio) =>
    spinRatio < LIFT_BEGINS
      ? (spinRatio / LIFT_BEGINS) * (0.083 + 0.885 * LIFT_BEGINS)
      : 0.083 + 0.885 * spinRatio,
  moment: momentOf,
}

/** Speed, drag, and lift for each unit of spin ratio, at one speed of the wind tunnel. */
interface Node {
  speedMps: number
  drag: number
  liftPerSpinRatio: number
}

const RADIUS_METRES = 0.04267 / 2

function node(speedMps: number, spinRpm: number, drag: number, lift: number): Node {
  const spinRatio = (((spinRpm * 2 * Math.PI) / 60) * RADIUS_METRES) / speedMps
  return { speedMps, drag, liftPerSpinRatio: lift / spinRatio }
}

/** Bearman & Harvey 1976, hexagonal dimples, by speed. */
const NODES: readonly Node[] = [
  node(13.7, 2000, 0.3624, 0.104),
  node(55.2, 3000, 0.2602, 0.1916),
  node(71.9, 2800, 0.255, 0.1584),
]

/** Between two nodes in proportion; beyond the last, as there. */
function atSpeed(speedMps: number, of: 'drag' | 'liftPerSpinRatio'): number {
  let [low] = NODES as [Node]
  for (const high of NODES) {
    if (speedMps <= high.speedMps) {
      const span = high.speedMps - low.speedMps
      const share = span === 0 ? 0 : Math.max(0, (speedMps - low.speedMps) / span)
      return low[of] + share * (high[of] - low[of])
    }
    low = high
  }
  return low[of]
}

/**
 * Bearman & Harvey's wind tunnel (1976): drag by speed, and lift in proportion to the spin ratio, by
 * speed. The spin slows as in the fit, since they did not measure it.
 */
export const TUNNEL_BALL: BallModel = {
  name: 'a wind tunnel',
  speedMps: [13.7, 71.9],
  spinRatio: [0, 0.35],
  drag: (speedMps) => atSpeed(speedMps, 'drag'),
  lift: (speedMps, spinRatio) => atSpeed(speedMps, 'liftPerSpinRatio') * spinRatio,
  moment: momentOf,
}

export const BALL_MODELS: readonly BallModel[] = [FITTED_BALL, TUNNEL_BALL]
