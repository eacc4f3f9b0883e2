import { toMinor } from './amounts'

/**
 * Divides an amount in proportion to weights so that nothing is lost: each share is the exact one
 * rounded down, and the units left over go one each to the largest remainders, the earlier share
 * first where two are equal. 100 in thirds → 34, 33, 33. A negative total is the mirror of the
 * positive one.
 *
 * Do it once, at the sale, and store the shares: a posted amount is never split again.
 *
 * @param totalMinor a safe integer of minor units, of any sign.
 * @param weights numbers of zero or more, not all zero; decimals are taken as they are written.
 * @returns as many shares as weights, in their order, adding up to the total; each differs from
 *   its exact share by less than one unit.
 * @throws RangeError for no weights, all zero, a negative or infinite one, an unsafe total.
 */
export function allocateByLargestRemainder(
  totalMinor: number,
  weights: readonly number[],
): number[] {
  const total = BigInt(toMinor(totalMinor))
  const parts = toWholeParts(weights)
  const whole = parts.reduce((sum, part) => sum + part, 0n)
  if (whole === 0n) throw new RangeError('There is nothing to divide by: every weight is zero')

  const size = total < 0n ? -total : total
  const shares = parts.map((part, index) => ({
    index,
    share: (size * part) / whole,
    remainder: (size * part) % whole,
  }))
  const given = shares.reduce((sum, { share }) => sum + share, 0n)
  const byRemainder = [...shares].sort(
    (a, b) => compare(b.remainder, a.remainder) || a.index - b.index,
  )
  for (const entry of byRemainder.slice(0, Number(size - given))) entry.share += 1n
  return shares.map(({ share }) => toMinor(total < 0n ? -share : share))
}

/**
 * The price of a run as the prices of its sessions, equal but for the odd unit, which the first
 * sessions carry.
 * @throws RangeError when the run has no session.
 */
export function splitRunPrice(run: { runPriceMinor: number; sessionCount: number }): number[] {
  const { runPriceMinor, sessionCount } = run
  if (!Number.isSafeInteger(sessionCount) || sessionCount < 1) {
    throw new RangeError(`A run of ${sessionCount} sessions has no price to split`)
  }
  // Equal weights need no fractions: every share is the same, and the first few carry the odd units.
  const size = Math.abs(toMinor(runPriceMinor))
  const odd = size % sessionCount
  const even = (size - odd) / sessionCount
  return Array.from({ length: sessionCount }, (_, index) => {
    const share = index < odd ? even + 1 : even
    return runPriceMinor < 0 ? 0 - share : share
  })
}

/**
 * What a golfer pays who joins late: the prices of the sessions still to come, by their numbers in
 * the run (from 1), as split for those who paid for all of it. Together with what has passed or was
 * called off it is the run's price.
 * @throws RangeError for a number that the run does not have, or has been given twice.
 */
export function priceOfRemaining(run: {
  runPriceMinor: number
  sessionCount: number
  remainingNumbers: readonly number[]
}): { priceMinor: number; sharesMinor: number[] } {
  const { remainingNumbers } = run
  const split = splitRunPrice(run)
  if (new Set(remainingNumbers).size < remainingNumbers.length) {
    throw new RangeError('A session remains once')
  }
  const sharesMinor = remainingNumbers.map((number) => {
    const share = split[number - 1]
    if (share === undefined) throw new RangeError(`The run has no session ${number}`)
    return share
  })
  return { priceMinor: sharesMinor.reduce((sum, share) => sum + share, 0), sharesMinor }
}

/** Weights as whole numbers in the same proportion, exactly as their decimals were written. */
function toWholeParts(weights: readonly number[]): bigint[] {
  const decimals = weights.map((weight) => {
    if (!Number.isFinite(weight) || weight < 0) throw new RangeError(`${weight} is no weight`)
    const [mantissa = '0', exponent = '0'] = String(weight).split('e')
    const [whole = '0', fraction = ''] = mantissa.split('.')
    return { figures: BigInt(whole + fraction), places: fraction.length - Number(exponent) }
  })
  const places = Math.max(0, ...decimals.map((decimal) => decimal.places))
  return decimals.map((decimal) => decimal.figures * 10n ** BigInt(places - decimal.places))
}

function compare(left: bigint, right: bigint): number {
  return left < right ? -1 : left > right ? 1 : 0
}
