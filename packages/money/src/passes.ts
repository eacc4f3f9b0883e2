import { toMinor } from './amounts'
import { divideHalfUp } from './rounding'

/**
 * What is earned in all of a pass, after part of it was used: in proportion to what is expected to
 * be used, so that what never will be (breakage) is earned along with it and not at the end.
 * Source: the rule of ASC 606 and IFRS 15 for customers' unexercised rights.
 *
 * Post the difference from what was earned before, never a share of its own. Uses beyond those
 * expected earn nothing more. What the state claims when unused is no breakage: count it as
 * expected.
 *
 * @param pass.used, pass.expectedUsed in one unit of any kind, sessions or minor units.
 * @returns cumulated minor units, from 0 to the price.
 * @throws RangeError for an amount or a count below zero, or nothing expected to be used.
 */
export function earnedOfPass(pass: {
  priceMinor: number
  used: number
  expectedUsed: number
}): number {
  const priceMinor = toMinor(pass.priceMinor)
  const used = toMinor(pass.used)
  const expectedUsed = toMinor(pass.expectedUsed)
  if (priceMinor < 0 || used < 0) throw new RangeError('A pass has nothing below zero')
  if (expectedUsed < 1) throw new RangeError('Of a pass something must be expected to be used')
  const counted = Math.min(used, expectedUsed)
  return toMinor(divideHalfUp(BigInt(priceMinor) * BigInt(counted), BigInt(expectedUsed)))
}
