import { getTimes } from 'suncalc'
import { toInstant, type LocalDate } from './local-time'

/** A place on the ground and a day of its calendar. */
export interface PlaceAndDay {
  /** North +, -90 to 90. */
  latitudeDeg: number
  /** East +, -180 to 180. */
  longitudeDeg: number
  dayLocal: LocalDate
  /** The venue's IANA zone, which decides when that day is. */
  zone: string
}

/** The sun over a place on one day. What does not happen that day is null. */
export interface SunTimes {
  sunriseAt: Date | null
  sunsetAt: Date | null
  civilDuskAt: Date | null
  /** Above or below the horizon all day; null where it rises and sets. */
  allDay: 'up' | 'down' | null
}

/**
 * Sunrise, sunset (the sun's centre 0.833° under the horizon: its radius and the usual refraction)
 * and the end of civil twilight (6°), for a level horizon at sea level, to within a minute.
 *
 * They belong to the day's noon: in a northern summer the sunset of a day may fall after midnight,
 * and is still that evening's.
 * @throws RangeError for a place off the globe, or a day or zone that does not exist.
 */
export function sunTimes({ latitudeDeg, longitudeDeg, dayLocal, zone }: PlaceAndDay): SunTimes {
  if (!(Math.abs(latitudeDeg) <= 90) || !(Math.abs(longitudeDeg) <= 180)) {
    throw new RangeError(`${latitudeDeg}, ${longitudeDeg} is no place`)
  }
  const noonAt = toInstant({ startsOnLocal: dayLocal, startsAtLocal: '12:00', zone })
  const times = getTimes(noonAt, latitudeDeg, longitudeDeg)
  return {
    sunriseAt: times.sunrise,
    sunsetAt: times.sunset,
    civilDuskAt: times.dusk,
    allDay: times.alwaysUp ? 'up' : times.alwaysDown ? 'down' : null,
  }
}

/** When the sun goes down that evening; null where it does not set, or does not rise. */
export function sunsetAt(place: PlaceAndDay): Date | null {
  return sunTimes(place).sunsetAt
}

/** When the sun comes up that morning; null where it does not rise, or does not set. */
export function sunriseAt(place: PlaceAndDay): Date | null {
  return sunTimes(place).sunriseAt
}

/** When civil twilight ends that evening; null where the sun does not get so low, or so high. */
export function civilDuskAt(place: PlaceAndDay): Date | null {
  return sunTimes(place).civilDuskAt
}

export type DuskRule = 'sunset' | 'civil-twilight'

/** The dusk an academy goes by: sunset, or the end of civil twilight where it chose that. */
export function duskAt(place: PlaceAndDay, rule: DuskRule = 'sunset'): Date | null {
  const times = sunTimes(place)
  return rule === 'sunset' ? times.sunsetAt : times.civilDuskAt
}

export type SessionLight =
  { kind: 'daylight' } | { kind: 'ends-after'; minutes: number } | { kind: 'after' }

/**
 * Whether a session is over by dusk, ends some minutes after it, or has all of it after. One that
 * ends at dusk is in daylight, one that begins at dusk is after it. Started minutes count whole.
 * @param dusk null where the sun does not set: daylight.
 */
export function lightOf(
  session: { startsAt: Date; endsAt: Date },
  dusk: Date | null,
): SessionLight {
  if (dusk === null || session.endsAt <= dusk) return { kind: 'daylight' }
  if (session.startsAt >= dusk) return { kind: 'after' }
  return { kind: 'ends-after', minutes: minutesBetween(dusk, session.endsAt) }
}

/** Minutes of a session that come after dusk, started ones whole; 0 where none does. */
export function darkMinutesOf(
  session: { startsAt: Date; endsAt: Date },
  dusk: Date | null,
): number {
  if (dusk === null || session.endsAt <= dusk) return 0
  return minutesBetween(session.startsAt > dusk ? session.startsAt : dusk, session.endsAt)
}

function minutesBetween(from: Date, to: Date): number {
  return Math.ceil((to.valueOf() - from.valueOf()) / 60_000)
}
