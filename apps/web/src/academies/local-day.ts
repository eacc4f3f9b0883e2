/** Days and times on a venue's or an academy's own clock, never on the reader's. */

const days = new Map<string, Intl.DateTimeFormat>()
const clocks = new Map<string, Intl.DateTimeFormat>()

/** The local day of an instant, "2026-09-17"; such days sort and compare as texts. */
export function localDayOf(at: string | number, zone: string): string {
  let day = days.get(zone)
  if (!day) {
    // Canada writes its days in this order, with these signs between.
    day = new Intl.DateTimeFormat('en-CA', { timeZone: zone })
    days.set(zone, day)
  }
  return day.format(new Date(at))
}

/** The local time of an instant, "18:00". */
export function localTimeOf(at: string | number, zone: string): string {
  let clock = clocks.get(zone)
  if (!clock) {
    clock = new Intl.DateTimeFormat('en-GB', { timeZone: zone, hour: '2-digit', minute: '2-digit' })
    clocks.set(zone, clock)
  }
  return clock.format(new Date(at))
}

/** The day it is now in a zone. */
export const todayIn = (zone: string): string => localDayOf(Date.now(), zone)

/** The day so many days later, or earlier. */
export function shiftDay(day: string, by: number): string {
  return new Date(Date.parse(`${day}T12:00:00Z`) + by * 86_400_000).toISOString().slice(0, 10)
}

/** 0 for Monday to 6 for Sunday. */
export function weekdayOf(day: string): number {
  return (new Date(`${day}T12:00:00Z`).getUTCDay() + 6) % 7
}

/** The Monday of a day's week. */
export const mondayOf = (day: string): string => shiftDay(day, -weekdayOf(day))
