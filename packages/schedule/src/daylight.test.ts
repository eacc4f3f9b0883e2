import { describe, expect, it } from 'vitest'
import { darkMinutesOf, duskAt, lightOf, sunriseAt, sunsetAt, sunTimes } from './daylight'
import { toInstant } from './local-time'

const PLACES = {
  london: { latitudeDeg: 51.5, longitudeDeg: -0.125, zone: 'Europe/London' },
  dublin: { latitudeDeg: 53.35, longitudeDeg: -6.26, zone: 'Europe/Dublin' },
  denver: { latitudeDeg: 39.7392, longitudeDeg: -104.9903, zone: 'America/Denver' },
  phoenix: { latitudeDeg: 33.4484, longitudeDeg: -112.074, zone: 'America/Phoenix' },
  sydney: { latitudeDeg: -33.8688, longitudeDeg: 151.2093, zone: 'Australia/Sydney' },
  northCape: { latitudeDeg: 71.17, longitudeDeg: 25.78, zone: 'Europe/Oslo' },
  reykjavik: { latitudeDeg: 64.15, longitudeDeg: -21.94, zone: 'Atlantic/Reykjavik' },
}

function secondsOff(at: Date | null, day: string, time: string, zone: string): number {
  const [hours = '', minutes = '', seconds = ''] = time.split(':')
  const startsAtLocal = `${hours}:${minutes}`
  const expected = +toInstant({ startsOnLocal: day, startsAtLocal, zone }) + Number(seconds) * 1000
  return Math.abs(Number(at) - expected) / 1000
}

describe('sunset and the end of civil twilight', () => {
  // Tolerance 60 s: London published [2], the others [D].
  it.each([
    ['london', '2025-06-21', '21:21:34', '22:09:19'],
    ['london', '2025-06-21', '21:22:06', '22:09:19'],
    ['dublin', '2026-12-21', '16:08:02', '16:50:56'],
    ['denver', '2026-03-20', '19:12:08', '19:39:05'],
    ['phoenix', '2026-07-04', '19:41:50', '20:10:32'],
    ['sydney', '2026-06-21', '16:53:49', '17:21:33'],
  ] as const)('in %s on %s at %s, and at %s', (place, dayLocal, sunset, civilDusk) => {
    const at = { ...PLACES[place], dayLocal }
    expect(secondsOff(duskAt(at), dayLocal, sunset, at.zone)).toBeLessThanOrEqual(60)
    const civilDuskAt = duskAt(at, 'civil-twilight')
    expect(secondsOff(civilDuskAt, dayLocal, civilDusk, at.zone)).toBeLessThanOrEqual(60)
  })

  it('are null where the sun does not set, or does not rise', () => {
    const summer = sunTimes({ ...PLACES.northCape, dayLocal: '2026-06-21' })
    expect(summer).toEqual({ sunriseAt: null, sunsetAt: null, civilDuskAt: null, allDay: 'up' })
    const winter = sunTimes({ ...PLACES.northCape, dayLocal: '2026-12-21' })
    expect(winter).toMatchObject({ sunriseAt: null, sunsetAt: null, allDay: 'down' })
    expect(winter.civilDuskAt).not.toBeNull()
    expect(sunsetAt({ ...PLACES.northCape, dayLocal: '2026-06-21' })).toBeNull()
    expect(sunriseAt({ ...PLACES.northCape, dayLocal: '2026-12-21' })).toBeNull()
  })

  it('belong to the evening of the day, even after midnight', () => {
    const dusk = sunsetAt({ ...PLACES.reykjavik, dayLocal: '2026-06-21' })
    expect(dusk?.toISOString().slice(0, 10)).toBe('2026-06-22')
    const sunrise = sunriseAt({ ...PLACES.reykjavik, dayLocal: '2026-06-21' })
    expect(sunrise?.toISOString().slice(0, 10)).toBe('2026-06-21')
  })

  it('come each day within some minutes of the day before, the whole year', () => {
    for (const place of [PLACES.dublin, PLACES.sydney, PLACES.denver]) {
      for (let day = 0; day < 365; day += 1) {
        const on = (offset: number) => {
          const at = new Date(Date.UTC(2026, 0, 1 + day + offset))
          return Number(sunsetAt({ ...place, dayLocal: at.toISOString().slice(0, 10) }))
        }
        expect(Math.abs(on(1) - on(0) - 86_400_000)).toBeLessThan(4 * 60_000)
      }
    }
  })

  it('refuses places off the globe and days that are none', () => {
    const dayLocal = '2026-06-21'
    expect(() => sunsetAt({ ...PLACES.dublin, latitudeDeg: 91, dayLocal })).toThrow(RangeError)
    expect(() => sunsetAt({ ...PLACES.dublin, longitudeDeg: NaN, dayLocal })).toThrow(RangeError)
    expect(() => sunsetAt({ ...PLACES.dublin, dayLocal: '2026-06-31' })).toThrow(RangeError)
  })
})

describe('the light of a session', () => {
  const dusk = new Date('2026-10-20T17:20:00Z')
  const session = (startMinutes: number, endMinutes: number) => ({
    startsAt: new Date(+dusk + startMinutes * 60_000),
    endsAt: new Date(+dusk + endMinutes * 60_000),
  })

  it.each([
    [-75, -1, { kind: 'daylight' }, 0],
    [-75, 0, { kind: 'daylight' }, 0],
    [-75, 1 / 60_000, { kind: 'ends-after', minutes: 1 }, 1],
    [-65, 10, { kind: 'ends-after', minutes: 10 }, 10],
    [-1 / 60_000, 60, { kind: 'ends-after', minutes: 60 }, 60],
    [0, 75, { kind: 'after' }, 75],
    [29, 104, { kind: 'after' }, 75],
  ])('from %d to %d minutes after dusk is %j', (start, end, light, darkMinutes) => {
    expect(lightOf(session(start, end), dusk)).toEqual(light)
    expect(darkMinutesOf(session(start, end), dusk)).toBe(darkMinutes)
  })

  it('is daylight where the sun does not set', () => {
    expect(lightOf(session(0, 75), null)).toEqual({ kind: 'daylight' })
    expect(darkMinutesOf(session(0, 75), null)).toBe(0)
  })
})
