/**
 * Where the sun stands: the low-accuracy solar coordinates of J. Meeus, Astronomical Algorithms,
 * chapter 25 (to 0.01°), with the sidereal time of chapter 12. Good from 1950 to 2100, anywhere.
 *
 * A root is sought between noon and midnight and not stepped to from an hour angle: near the polar
 * day, where the sun grazes the horizon, the usual steps are minutes off.
 */

const DAY_MILLISECONDS = 86_400_000
/** 1 January 2000, 12:00 UTC. */
const J2000_MS = 946_728_000_000
/** Terrestrial less universal time, days; between 64 and 75 s in this half century. */
const DELTA_T_DAYS = 69 / 86_400
const RADIANS = Math.PI / 180

/** Milliseconds of error that a root is left with. */
const ROOT_MILLISECONDS = 100

export interface Place {
  /** North +, -90 to 90. */
  latitudeDeg: number
  /** East +, -180 to 180. */
  longitudeDeg: number
}

/** When the sun passes the meridian, nearest to an instant; both in epoch milliseconds. */
export function findTransit(nearMs: number, { longitudeDeg }: Place): number {
  let transitMs = nearMs
  for (let step = 0; step < 3; step += 1) {
    const turns = hourAngle(transitMs, longitudeDeg) / (2 * Math.PI)
    transitMs -= turns * DAY_MILLISECONDS
  }
  return transitMs
}

/**
 * When the sun crosses an altitude in the half day before or after a transit, in epoch
 * milliseconds; null where it stays on one side.
 * @param crossing.altitudeDeg of the sun's centre, without refraction.
 */
export function findCrossing(
  crossing: { transitMs: number; half: 'morning' | 'evening'; altitudeDeg: number },
  place: Place,
): number | null {
  const { transitMs, half, altitudeDeg } = crossing
  let high = transitMs
  let low = transitMs + (half === 'evening' ? 0.5 : -0.5) * DAY_MILLISECONDS
  const isAbove = (atMs: number) => sunAltitudeDeg(atMs, place) > altitudeDeg
  if (!isAbove(high) || isAbove(low)) return null
  while (Math.abs(high - low) > ROOT_MILLISECONDS) {
    const middle = (high + low) / 2
    if (isAbove(middle)) high = middle
    else low = middle
  }
  return Math.round((high + low) / 2)
}

/** Altitude of the sun's centre over a level horizon, degrees, without refraction. */
export function sunAltitudeDeg(atMs: number, { latitudeDeg, longitudeDeg }: Place): number {
  const latitude = latitudeDeg * RADIANS
  const { declination, rightAscension } = sunCoordinates(atMs)
  const sine =
    Math.sin(latitude) * Math.sin(declination) +
    Math.cos(latitude) *
      Math.cos(declination) *
      Math.cos(siderealAngle(atMs, longitudeDeg) - rightAscension)
  return Math.asin(sine) / RADIANS
}

/** How far the sun is past the meridian, radians, from -π to π. */
function hourAngle(atMs: number, longitudeDeg: number): number {
  const angle = siderealAngle(atMs, longitudeDeg) - sunCoordinates(atMs).rightAscension
  return angle - 2 * Math.PI * Math.round(angle / (2 * Math.PI))
}

/** Sidereal time of a place, radians: Meeus 12.4 without its terms below 0.01 s of time. */
function siderealAngle(atMs: number, longitudeDeg: number): number {
  const days = (atMs - J2000_MS) / DAY_MILLISECONDS
  return RADIANS * (280.46061837 + 360.98564736629 * days + longitudeDeg)
}

/** Apparent right ascension and declination, radians. Numbers in brackets are Meeus's formulas. */
function sunCoordinates(atMs: number): { rightAscension: number; declination: number } {
  const centuries = ((atMs - J2000_MS) / DAY_MILLISECONDS + DELTA_T_DAYS) / 36_525
  // Mean longitude (25.2), mean anomaly (25.3), equation of the centre.
  const meanLongitudeDeg = 280.46646 + centuries * (36_000.76983 + centuries * 0.0003032)
  const anomaly = RADIANS * (357.52911 + centuries * (35_999.05029 - centuries * 0.0001537))
  const centreDeg =
    (1.914602 - centuries * (0.004817 + centuries * 0.000014)) * Math.sin(anomaly) +
    (0.019993 - centuries * 0.000101) * Math.sin(2 * anomaly) +
    0.000289 * Math.sin(3 * anomaly)
  // Nutation and aberration, by the longitude of the moon's ascending node.
  const node = RADIANS * (125.04 - 1_934.136 * centuries)
  const longitude = RADIANS * (meanLongitudeDeg + centreDeg - 0.00569 - 0.00478 * Math.sin(node))
  // Mean obliquity (22.2) with the correction of (25.8).
  const obliquity =
    RADIANS *
    (23.439291 -
      centuries * (0.0130042 + centuries * (0.00000016 - centuries * 0.000000504)) +
      0.00256 * Math.cos(node))
  return {
    rightAscension: Math.atan2(Math.cos(obliquity) * Math.sin(longitude), Math.cos(longitude)),
    declination: Math.asin(Math.sin(obliquity) * Math.sin(longitude)),
  }
}
