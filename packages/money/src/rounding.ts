/**
 * A quotient to the nearest whole number, exact halves away from zero: 166.5 → 167, -166.5 → -167.
 *
 * This is the tax law's "half-up" for amounts paid, and its mirror for amounts given back, so that
 * a refund of everything is the sale with its sign turned. Source: Streamlined Sales and Use Tax
 * Agreement §324, as given second hand: the third decimal decides, and five goes up.
 */
export function divideHalfUp(dividend: bigint, divisor: bigint): bigint {
  if (divisor <= 0n) throw new RangeError('The divisor must be above zero')
  const size = dividend < 0n ? -dividend : dividend
  const quotient = (2n * size + divisor) / (2n * divisor)
  return dividend < 0n ? -quotient : quotient
}
