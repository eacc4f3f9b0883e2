import { Body, Observer, SearchAltitude, SearchHourAngle, Equator, Horizon } from 'astronomy-engine'
import { getTimes } from 'suncalc'
import { describe, expect, it } from 'vitest'
import { sunTimes } from '@marram/schedule'

/** Two libraries that know nothing of each other, over places and dates; to within 60 s. */
const TOLERANCE_SECONDS = 60
const HALF_DAY = 43_200_000
const STEP_DAYS = process.env['MARRAM_DEEP'] === '1' ? 1 : 9

const LONGITUDES = [
  { longitudeDeg: 0, zone: 'Etc/UTC' },
  { longitudeDeg: -104.99, zone: 'America/Denver' },
  { longitudeDeg: 151.21, zone: 'Australia/Sydney' },
  { longitudeDeg: 179.9, zone: 'Pacific/Auckland' },
]

function forEachPlace(
  latitudes: readonly number[],
  visit: (place: {
    latitudeDeg: number
    longitudeDeg: number
    zone: string
    dayLocal: string
  }) => void,
): void {
  for (const latitudeDeg of latitudes) {
    for (const place of LONGITUDES) {
      for (let day = 0; day < 730; day += STEP_DAYS) {
        const dayLocal = new Date(Date.UTC(2026, 0, 1 + day)).toISOString().slice(0, 10)
        visit({ latitudeDeg, ...place, dayLocal })
      }
    }
  }
}

describe('sunrise, sunset and dusk', () => {
  it('are those of astronomy-engine where golf is played', { timeout: 120_000 }, () => {
    let worstSeconds = 0
    forEachPlace([-50, -34, 0, 21, 40, 53, 60], (place) => {
      const ours = sunTimes(place)
      const { pairs } = askAstronomyEngine(place, ours)
      for (const { name, our, their } of pairs) {
        const label = `${name} at ${JSON.stringify(place)}`
        expect(our, label).not.toBeNull()
        expect(their, label).not.toBeNull()
        const seconds = Math.abs(Number(our) - Number(their)) / 1000
        expect(seconds, label).toBeLessThanOrEqual(TOLERANCE_SECONDS)
        worstSeconds = Math.max(worstSeconds, seconds)
      }
    })
    // Far inside the tolerance: a slip of half a minute would show.
    expect(worstSeconds).toBeLessThan(15)
  })

  it('are those of suncalc, up to 60 degrees', () => {
    forEachPlace([-50, -34, 0, 21, 40, 53, 60], (place) => {
      const ours = sunTimes(place)
      // Its day is the one whose noon is nearest.
      const noonMs = (Number(ours.sunriseAt) + Number(ours.sunsetAt)) / 2
      const theirs = getTimes(new Date(noonMs), place.latitudeDeg, place.longitudeDeg)
      const label = JSON.stringify(place)
      for (const [our, their] of [
        [ours.sunriseAt, theirs.sunrise],
        [ours.sunsetAt, theirs.sunset],
        [ours.civilDuskAt, theirs.dusk],
      ] as const) {
        const seconds = Math.abs(Number(our) - Number(their)) / 1000
        expect(seconds, label).toBeLessThanOrEqual(TOLERANCE_SECONDS)
      }
    })
  })

  it('hold in the far north and south, up to what grazes the horizon', { timeout: 120_000 }, () => {
    let nothingCount = 0
    forEachPlace([-70, -66, 64, 67, 71, 80], (place) => {
      const ours = sunTimes(place)
      const { pairs, altitudeAt, transit } = askAstronomyEngine(place, ours)
      for (const { name, our, their, altitudeDeg, half } of pairs) {
        const label = `${name} at ${JSON.stringify(place)}: ${String(our)}, ${String(their)}`
        if (our === null) nothingCount += 1
        const seconds = Math.abs(Number(our) - Number(their)) / 1000
        if (our !== null && their !== null && seconds <= TOLERANCE_SECONDS) continue
        if (our === null && their === null) continue
        // Where minutes change the height by next to nothing, the height itself must agree; where
        // one sees a crossing and the other none, the lowest or highest sun is at the line.
        const heights = [our ?? their, transit, new Date(+transit + half * HALF_DAY)].map((at) =>
          Math.abs(altitudeAt(at ?? transit) - altitudeDeg),
        )
        expect(Math.min(...heights), label).toBeLessThan(0.02)
      }
    })
    expect(nothingCount).toBeGreaterThan(100)
  })
})

/** Its answers for the half days around the transit of ours, and its height of the sun. */
function askAstronomyEngine(
  place: { latitudeDeg: number; longitudeDeg: number; dayLocal: string },
  ours: ReturnType<typeof sunTimes>,
) {
  const observer = new Observer(place.latitudeDeg, place.longitudeDeg, 0)
  const noonMs = Date.parse(`${place.dayLocal}T12:00:00Z`) - place.longitudeDeg * 240_000
  const transit = SearchHourAngle(Body.Sun, observer, 0, new Date(noonMs - HALF_DAY / 6)).time.date
  const search = (half: 1 | -1, altitudeDeg: number) => {
    const from = half === 1 ? transit : new Date(+transit - HALF_DAY)
    return SearchAltitude(Body.Sun, observer, -half, from, 0.5, altitudeDeg)?.date ?? null
  }
  const pair = (name: string, our: Date | null, half: 1 | -1, altitudeDeg: number) => {
    return { name, our, their: search(half, altitudeDeg), half, altitudeDeg }
  }
  return {
    transit,
    altitudeAt: (at: Date) => {
      const { ra, dec } = Equator(Body.Sun, at, observer, true, true)
      return Horizon(at, observer, ra, dec).altitude
    },
    pairs: [
      pair('sunrise', ours.sunriseAt, -1, -0.833),
      pair('sunset', ours.sunsetAt, 1, -0.833),
      pair('civil dusk', ours.civilDuskAt, 1, -6),
    ],
  }
}
