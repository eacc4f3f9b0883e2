import jstat from 'jstat'

// A script without named exports: Node gives it whole, as the default one.
const { jStat } = jstat

/**
 * Whether an angle changed, or only seemed to: the minimal detectable change of repeated
 * measurements, and the player's own spread where there are swings enough to know it.
 */

/** How an angle was measured; each has its standard error of measurement, in degrees. */
export type Method = 'sensor' | 'camera' | 'goniometer' | 'eye'

/**
 * Where academies start: sensors 3 (within the 2 to 4 of Reissner et al. 2019), goniometers 6
 * (within their 4 to 11), cameras 5 from memory, by eye 10 by common practice.
 */
export const USUAL_ERROR_DEG: Readonly<Record<Method, number>> = {
  sensor: 3,
  camera: 5,
  goniometer: 6,
  eye: 10,
}

/** For 95 % of what chance does, both ways. */
const NORMAL_95 = 1.96

/** Readings of one angle in one method; one reading, or as many as there are swings. */
export interface Readings {
  valuesDeg: readonly number[]
  errorDeg: number
}

/** What to compare with: other readings, or a target that has no error. */
export type Against = Readings | { targetDeg: number }

export interface Change {
  differenceDeg: number
  /** The smallest difference that counts: smaller ones are within what measuring does by itself. */
  leastDeg: number
  isChange: boolean
  /** What decided: the error of the measurement, or the player's own spread. */
  by: 'measuring' | 'spread'
}

/**
 * Compares readings with others, or with a target.
 *
 * Measuring: 1.96·√(SEM₁²/n + SEM₂²/m), and 1.96·SEM/√n against a target. With three readings or
 * more on each side (on the one side, against a target) the half-width of Welch's 95 % interval of
 * the difference is worked out too, and the wider of the two decides.
 * @throws RangeError where there is no reading.
 */
export function changeOf({ of, against }: { of: Readings; against: Against }): Change {
  const later = sampleOf(of)
  const earlier = 'targetDeg' in against ? targetOf(against.targetDeg) : sampleOf(against)
  const differenceDeg = later.mean - earlier.mean
  const measuring = NORMAL_95 * Math.sqrt(later.errorOfMean ** 2 + earlier.errorOfMean ** 2)
  const spread = spreadOf(later, earlier)
  const leastDeg = Math.max(measuring, spread)
  return {
    differenceDeg,
    leastDeg,
    isChange: Math.abs(differenceDeg) > leastDeg,
    by: spread > measuring ? 'spread' : 'measuring',
  }
}

interface Sample {
  count: number
  mean: number
  /** Of the measurement's error, over all readings of this side. */
  errorOfMean: number
  /** Null where there are too few swings to know the player's own spread. */
  varianceOfMean: number | null
}

/** Of a mean, in squared degrees: what is smaller is the arithmetic's own. */
const NO_VARIANCE = 1e-12
/** With fewer swings nobody knows how much a player varies. */
const SWINGS_FOR_SPREAD = 3

function sampleOf({ valuesDeg, errorDeg }: Readings): Sample {
  const count = valuesDeg.length
  if (count === 0) throw new RangeError('nothing was measured')
  const mean = valuesDeg.reduce((sum, value) => sum + value, 0) / count
  const squares = valuesDeg.reduce((sum, value) => sum + (value - mean) ** 2, 0)
  return {
    count,
    mean,
    errorOfMean: errorDeg / Math.sqrt(count),
    varianceOfMean: count >= SWINGS_FOR_SPREAD ? squares / (count - 1) / count : null,
  }
}

const targetOf = (targetDeg: number): Sample => ({
  count: Infinity,
  mean: targetDeg,
  errorOfMean: 0,
  varianceOfMean: 0,
})

/**
 * Half of Welch's 95 % interval: t times the standard error of the difference, with the degrees of
 * freedom of Welch and Satterthwaite. Nothing where a side has too few swings.
 */
function spreadOf(later: Sample, earlier: Sample): number {
  const [a, b] = [later.varianceOfMean, earlier.varianceOfMean]
  if (a === null || b === null || a + b < NO_VARIANCE) return 0
  const freedom = (a + b) ** 2 / (a ** 2 / (later.count - 1) + b ** 2 / (earlier.count - 1))
  return jStat.studentt.inv(0.975, freedom) * Math.sqrt(a + b)
}
