import { Temporal } from 'temporal-polyfill'

/** A calendar day without a zone, `2026-04-06`. */
export type LocalDate = string
/** A day and a wall clock's time without a zone, `2026-04-06T18:00`. */
export type LocalDateTime = string

/** A change of a zone's clocks. */
export interface ZoneTransition {
  at: Date
  /** The day it happens on, by the clock before it. */
  dayLocal: LocalDate
  /** Whether the clocks are put forward (an hour is missing) or back (one occurs twice). */
  direction: 'forward' | 'back'
  /** Minutes ahead of UTC. */
  offsetBeforeMinutes: number
  offsetAfterMinutes: number
}

const MINUTE_MILLISECONDS = 60_000
const DAY_MILLISECONDS = 86_400_000

/**
 * The instant of a local time. One in a gap takes the offset before the gap (02:30 is held at
 * 03:30), one that occurs twice is the first: RFC 5545 §3.3.5, Temporal's `compatible`.
 * @throws RangeError for a day, a time or a zone that does not exist.
 */
export function toInstant(local: {
  startsOnLocal: LocalDate
  startsAtLocal: string
  zone: string
}): Date {
  toLocalMs(local.startsOnLocal, local.startsAtLocal)
  const zoned = Temporal.PlainDateTime.from(
    `${local.startsOnLocal}T${local.startsAtLocal}`,
  ).toZonedDateTime(local.zone, { disambiguation: 'compatible' })
  return new Date(zoned.epochMilliseconds)
}

/** The day and the time a zone's clocks show at an instant. @throws RangeError for no such zone. */
export function toLocal(given: { at: Date; zone: string }): {
  dayLocal: LocalDate
  timeLocal: string
} {
  const offsetMs = zonedAt(given.at.valueOf(), given.zone).offsetNanoseconds / 1e6
  const text = fromLocalMs(given.at.valueOf() + offsetMs)
  return { dayLocal: text.slice(0, 10), timeLocal: text.slice(11) }
}

/**
 * Changes of a zone's clocks from one instant to before another, in order.
 * @throws RangeError for a zone that does not exist.
 */
export function transitionsBetween(span: { zone: string; from: Date; to: Date }): ZoneTransition[] {
  const found: ZoneTransition[] = []
  // The look-up is for what comes after an instant, and one at `from` itself belongs to the span.
  let before = zonedAt(span.from.valueOf() - 1, span.zone)
  for (;;) {
    const after = before.getTimeZoneTransition('next')
    if (after === null || after.epochMilliseconds >= span.to.valueOf()) return found
    const offsetBeforeMinutes = offsetMinutes(before)
    const offsetAfterMinutes = offsetMinutes(after)
    before = after
    // A zone's other changes, such as of its name alone, move no clock.
    if (offsetAfterMinutes === offsetBeforeMinutes) continue
    const at = after.epochMilliseconds
    found.push({
      at: new Date(at),
      dayLocal: fromLocalMs(at + offsetBeforeMinutes * MINUTE_MILLISECONDS).slice(0, 10),
      direction: offsetAfterMinutes > offsetBeforeMinutes ? 'forward' : 'back',
      offsetBeforeMinutes,
      offsetAfterMinutes,
    })
  }
}

/**
 * A reader of many local times of one zone between two, with the zone asked once. It answers as
 * `toInstant` does, in milliseconds.
 */
export function instantReader(span: {
  zone: string
  fromLocalMs: number
  toLocalMs: number
}): (localMs: number) => number {
  const { firstOffsetMs, changes } = offsetsBetween(
    span.zone,
    new Date(span.fromLocalMs).getUTCFullYear(),
    new Date(span.toLocalMs).getUTCFullYear(),
  )
  return (localMs) => {
    const last = changes.findLast((change) => localMs >= change.fromLocalMs)
    return localMs - (last?.offsetMs ?? firstOffsetMs)
  }
}

interface Offsets {
  firstOffsetMs: number
  /** From which local time on an offset holds. */
  changes: readonly { fromLocalMs: number; offsetMs: number }[]
}

/**
 * What was asked of zones before. To ask takes as long as to expand a run of eight sessions, and
 * an academy asks for the same season of the same zone all day.
 */
const offsetsAsked = new Map<string, Offsets>()
const MOST_OFFSETS_ASKED = 500

function offsetsBetween(zone: string, firstYear: number, lastYear: number): Offsets {
  const key = `${zone} ${firstYear} ${lastYear}`
  const known = offsetsAsked.get(key)
  if (known) return known
  if (offsetsAsked.size >= MOST_OFFSETS_ASKED) offsetsAsked.clear()
  const asked = askOffsets(zone, firstYear, lastYear)
  offsetsAsked.set(key, asked)
  return asked
}

function askOffsets(zone: string, firstYear: number, lastYear: number): Offsets {
  // No zone is as much as a day from UTC, so a day on either side holds all that can matter.
  const from = new Date(Date.UTC(firstYear, 0, 1) - DAY_MILLISECONDS)
  const to = new Date(Date.UTC(lastYear + 1, 0, 1) + DAY_MILLISECONDS)
  const changes = transitionsBetween({ zone, from, to }).map(
    ({ at, offsetBeforeMinutes, offsetAfterMinutes }) => ({
      // Both a time in a gap and the first of two equal ones belong to the offset before.
      fromLocalMs:
        at.valueOf() + Math.max(offsetBeforeMinutes, offsetAfterMinutes) * MINUTE_MILLISECONDS,
      offsetMs: offsetAfterMinutes * MINUTE_MILLISECONDS,
    }),
  )
  const firstOffsetMs = offsetMinutes(zonedAt(from.valueOf(), zone)) * MINUTE_MILLISECONDS
  return { firstOffsetMs, changes }
}

/**
 * A local time in milliseconds, read as if it were UTC: to be counted with, never to be shown.
 * @throws RangeError for a day or a time that does not exist, such as 2026-02-30 or 24:00.
 */
export function toLocalMs(dayLocal: LocalDate, timeLocal: string): number {
  const text = `${dayLocal}T${timeLocal}`
  const localMs = /^\d{4}-\d\d-\d\dT\d\d:\d\d$/.test(text) ? Date.parse(`${text}:00Z`) : NaN
  // Date.parse lets 30 February pass as 2 March.
  if (Number.isNaN(localMs) || fromLocalMs(localMs) !== text) {
    throw new RangeError(`${JSON.stringify(text)} is no local time like "2026-04-06T18:00"`)
  }
  return localMs
}

/** The reverse of `toLocalMs`. */
export function fromLocalMs(localMs: number): LocalDateTime {
  return new Date(localMs).toISOString().slice(0, 16)
}

function zonedAt(epochMilliseconds: number, zone: string): Temporal.ZonedDateTime {
  return Temporal.Instant.fromEpochMilliseconds(epochMilliseconds).toZonedDateTimeISO(zone)
}

function offsetMinutes(zoned: Temporal.ZonedDateTime): number {
  return zoned.offsetNanoseconds / 6e10
}
