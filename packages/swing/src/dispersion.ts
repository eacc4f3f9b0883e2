/** Shots as points: where they start against how far they carry, and how an angle goes over time. */

export interface Shot {
  x: number
  y: number
}

/** The ellipse that holds 95 % of a player's shots, were they spread as the normal law has it. */
export interface Ellipse {
  centre: Shot
  semiMajor: number
  semiMinor: number
  /** Of the longer axis from x towards y, over −90° to 90°. */
  angleDeg: number
}

/** Fewer shots have no spread in two directions. */
export const SHOTS_FOR_ELLIPSE = 3

/**
 * The 95 % ellipse of some shots: semi-axes √(c·λ) with λ the eigenvalues of their covariance. With
 * a covariance that is known c would be 5.9915; from n shots it is
 * 2(n−1)(n+1)/(n(n−2))·F.95(2, n−2), which is larger for few. Null for fewer than three.
 */
export function ellipseOf(shots: readonly Shot[]): Ellipse | null {
  const n = shots.length
  if (n < SHOTS_FOR_ELLIPSE) return null
  const centre = { x: meanOf(shots.map(({ x }) => x)), y: meanOf(shots.map(({ y }) => y)) }
  let [xx, xy, yy] = [0, 0, 0]
  for (const shot of shots) {
    const [dx, dy] = [shot.x - centre.x, shot.y - centre.y]
    xx += dx * dx
    xy += dx * dy
    yy += dy * dy
  }
  const covariance = { xx: xx / (n - 1), xy: xy / (n - 1), yy: yy / (n - 1) }
  return { centre, ...ellipseOfCovariance(covariance, factorFor(n)) }
}

/** The semi-axes and the angle of an ellipse by its covariance and its factor c. */
export function ellipseOfCovariance(
  { xx, xy, yy }: { xx: number; xy: number; yy: number },
  factor: number,
): Omit<Ellipse, 'centre'> {
  const middle = (xx + yy) / 2
  const half = Math.hypot((xx - yy) / 2, xy)
  return {
    semiMajor: Math.sqrt(factor * (middle + half)),
    semiMinor: Math.sqrt(factor * Math.max(0, middle - half)),
    angleDeg: (Math.atan2(2 * xy, xx - yy) / 2) * (180 / Math.PI),
  }
}

/** F.95(2, m) has a closed form: m/2·(0.05^(−2/m) − 1). */
export function factorFor(n: number): number {
  const m = n - 2
  const f = (m / 2) * (0.05 ** (-2 / m) - 1)
  return ((2 * (n - 1) * (n + 1)) / (n * m)) * f
}

/** The plain limits of a chart of single values over time. */
export interface Limits {
  mean: number
  lower: number
  upper: number
}

/** For ranges of two neighbours: 3 divided by 1.128. */
const RANGE_FACTOR = 2.66

/** Mean ± 2.66 × the mean moving range of values in order of time. Null for fewer than two. */
export function limitsOf(values: readonly number[]): Limits | null {
  if (values.length < 2) return null
  const mean = meanOf(values)
  const ranges = values.slice(1).map((value, index) => Math.abs(value - (values[index] ?? value)))
  const reach = RANGE_FACTOR * meanOf(ranges)
  return { mean, lower: mean - reach, upper: mean + reach }
}

const meanOf = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / values.length
