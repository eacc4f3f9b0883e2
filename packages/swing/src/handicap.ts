/**
 * A handicap worked out from entered scores by the Rules of Handicapping. It is an estimate: the
 * official figure comes from the golfer's own association, and is typed in with its date.
 */

/** One round of eighteen holes. */
export interface Score {
  adjustedGross: number
  courseRating: number
  slopeRating: number
  /** The playing conditions calculation of that day, −1 to +3. */
  conditions: number
}

/** To one decimal, a half upwards, also below nothing: −1.55 is −1.5 (Rule 5.1c). */
export const toTenth = (value: number): number => Math.floor(value * 10 + 0.5 + 1e-9) / 10 + 0

/** 113/Slope × (adjusted gross − Course Rating − conditions), to a tenth (Rule 5.1). */
export function differentialOf(score: Score): number {
  const { adjustedGross, courseRating, slopeRating, conditions } = score
  return toTenth((113 / slopeRating) * (adjustedGross - courseRating - conditions))
}

/** Of how many of the lowest differentials the mean is taken, and what is added, by scores. */
function sharesOf(count: number): { lowest: number; adjustment: number } | null {
  if (count < 3) return null
  if (count === 3) return { lowest: 1, adjustment: -2 }
  if (count === 4) return { lowest: 1, adjustment: -1 }
  if (count === 5) return { lowest: 1, adjustment: 0 }
  if (count === 6) return { lowest: 2, adjustment: -1 }
  if (count <= 8) return { lowest: 2, adjustment: 0 }
  if (count <= 11) return { lowest: 3, adjustment: 0 }
  if (count <= 14) return { lowest: 4, adjustment: 0 }
  if (count <= 16) return { lowest: 5, adjustment: 0 }
  if (count <= 18) return { lowest: 6, adjustment: 0 }
  return { lowest: count === 19 ? 7 : 8, adjustment: 0 }
}

const LATEST_SCORES = 20
export const HIGHEST_HANDICAP = 54

/**
 * The estimate from a record's differentials, the latest last: of the latest twenty the mean of the
 * lowest eight, of fewer by the table of Rule 5.2a; rising over the lowest of the year only as the
 * caps let it; 54.0 at most. Null for fewer than three scores.
 */
export function handicapFrom(given: {
  differentials: readonly number[]
  /** The lowest handicap of the twelve months before, where there is one. */
  lowest?: number
}): number | null {
  const latest = given.differentials.slice(-LATEST_SCORES)
  const shares = sharesOf(latest.length)
  if (!shares) return null
  const counted = [...latest].sort((a, b) => a - b).slice(0, shares.lowest)
  const mean = counted.reduce((sum, value) => sum + value, 0) / counted.length
  const free = toTenth(mean + shares.adjustment)
  const capped = given.lowest === undefined ? free : capRise({ to: free, lowest: given.lowest })
  return Math.min(HIGHEST_HANDICAP, capped)
}

/** A rise of more than 3.0 over the lowest of a year counts half from there, and 5.0 at most. */
export function capRise({ to, lowest }: { to: number; lowest: number }): number {
  const rise = to - lowest
  if (rise <= 3) return to
  return toTenth(lowest + Math.min(5, 3 + (rise - 3) / 2))
}

/** By how much a much better score than the handicap takes all of the latest twenty down. */
export function exceptionalReduction(given: { differential: number; handicap: number }): number {
  const better = given.handicap - given.differential
  if (better >= 10) return -2
  return better >= 7 ? -1 : 0
}

/** HI × Slope/113 + (Course Rating − Par), not rounded, since it goes on into other figures. */
export function courseHandicapOf(given: {
  handicap: number
  slopeRating: number
  courseRating: number
  par: number
}): number {
  const { handicap, slopeRating, courseRating, par } = given
  return (handicap * slopeRating) / 113 + (courseRating - par)
}
