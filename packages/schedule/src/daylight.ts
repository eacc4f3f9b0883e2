import { toInstant, type LocalDate } from './local-time'
import { findCrossing, findTransit, sunAltitudeDeg, type Place } from './sun'

/** A place on the ground and a day of its calendar. */
export interface PlaceAndDay extends Place {
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

/** The sun's centre when its upper edge is seen on the horizon: its radius and refraction. */
const SUNSET_DEG = -0.833
const CIVIL_DUSK_DEG = -6

/**
 * Sunrise, sunset (the sun's centre 0.833° under the horizon: its radius and the usual refraction)
 * and the end of civil twilight (6°), for a level horizon at sea level, to within a minute.
 *
 * They belong to the day's noon: in a northern summer the sunset of a day may fall after midnight,
 * and is still that evening's.
 * @throws RangeError for a place off the globe, or a day or zone that does not exist.
 */
export function sunTimes(place: PlaceAndDay): SunTimes {
  const day = new SolarDay(place)
  const sunriseAt = day.find('morning', SUNSET_DEG)
  const sunsetAt = day.find('evening', SUNSET_DEG)
  const allDay = day.isUpAtNoon() ? 'up' : 'down'
  return {
    sunriseAt,
    sunsetAt,
    civilDuskAt: day.find('evening', CIVIL_DUSK_DEG),
    allDay: sunriseAt === null && sunsetAt === null ? allDay : null,
  }
}

/** When the sun goes down that evening; null where it does not set, or does not rise. */
export function sunsetAt(place: PlaceAndDay): Date | null {
  return new SolarDay(place).find('evening', SUNSET_DEG)
}

/** When the sun comes up that morning; null where it does not rise, or does not set. */
export function sunriseAt(place: PlaceAndDay): Date | null {
  return new SolarDay(place).find('morning', SUNSET_DEG)
}

/** When civil twilight ends that evening; null where the sun does not get so low, or so high. */
export function civilDuskAt(place: PlaceAndDay): Date | null {
  return new SolarDay(place).find('evening', CIVIL_DUSK_DEG)
}

/** The half days before and after one noon of a place. */
class SolarDay {
  readonly #place: Place
  readonly #transitMs: number

  constructor({ dayLocal, zone, ...place }: PlaceAndDay) {
    if (!(Math.abs(place.latitudeDeg) <= 90) || !(Math.abs(place.longitudeDeg) <= 180)) {
      throw new RangeError(`${place.latitudeDeg}, ${place.longitudeDeg} is no place`)
    }
    const noonAt = toInstant({ startsOnLocal: dayLocal, startsAtLocal: '12:00', zone })
    this.#place = place
    this.#transitMs = findTransit(noonAt.valueOf(), place)
  }

  find(half: 'morning' | 'evening', altitudeDeg: number): Date | null {
    const crossing = { transitMs: this.#transitMs, half, altitudeDeg }
    const crossingMs = findCrossing(crossing, this.#place)
    return crossingMs === null ? null : new Date(crossingMs)
  }

  isUpAtNoon(): boolean {
    return sunAltitudeDeg(this.#transitMs, this.#place) > SUNSET_DEG
  }
}

export type DuskRule = 'sunset' | 'civil-twilight'

/** The dusk an academy goes by: sunset, or the end of civil twilight where it chose that. */
export function duskAt(place: PlaceAndDay, rule: DuskRule = 'sunset'): Date | null {
  return rule === 'sunset' ? sunsetAt(place) : civilDuskAt(place)
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
