import { expandFloating } from './rrule-adapter'
import { fromLocalMs, toLocalMs, type LocalDate, type LocalDateTime } from './local-time'

export const WEEKDAYS = ['MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU'] as const
export type Weekday = (typeof WEEKDAYS)[number]

/** A weekday, or the nth of its kind in the month: 2 is the second, -1 the last, null is each. */
export interface ByDay {
  weekday: Weekday
  nth: number | null
}

export type RecurrenceEnd =
  | { kind: 'count'; count: number }
  /** A day, wholly included (`2026-05-26`), or a local time on it (`2026-05-26T18:00`). */
  | { kind: 'until'; untilLocal: string }

/**
 * When a clinic meets, in floating local time: the part of RFC 5545's RRULE that an academy needs
 * and that can be said in a sentence. It always ends.
 */
export interface Recurrence {
  freq: 'daily' | 'weekly' | 'monthly'
  /** Every day, week or month is 1, every second one 2. */
  interval: number
  /** Empty: the weekday of the start when weekly, no matter which otherwise. */
  byDay: readonly ByDay[]
  /** Which of a month's matching days: 1 the first, -1 the last. Empty: all of them. */
  bySetPos: readonly number[]
  /** Days of the month, from 1; -1 is the last. A month without the day is passed over. */
  byMonthDay: readonly number[]
  /** On which day an interval of weeks turns over. */
  weekStart: Weekday
  ends: RecurrenceEnd
}

/** The most sessions one run may have. */
export const MAX_OCCURRENCES = 400

export interface LocalPattern {
  rule: Recurrence
  /** The first day that may be one of the dates, `2026-04-06`; it need not match the rule. */
  startsOnLocal: LocalDate
  /** `18:00` */
  startsAtLocal: string
  /** Days left out; those that are none of the dates do nothing. */
  skipDates?: readonly LocalDate[]
}

/**
 * The dates of a rule as local times, in order, without the days left out. A rule's COUNT counts
 * the days left out too, as in RFC 5545; `datesOfRun` holds the full number instead.
 * @throws RangeError for a day or time that does not exist, and for more than 400 dates.
 */
export function expandLocal(pattern: LocalPattern): LocalDateTime[] {
  return expandLocalMs(pattern).map(fromLocalMs)
}

/** As `expandLocal`, in milliseconds of local time read as if it were UTC. */
export function expandLocalMs({ skipDates = [], ...pattern }: LocalPattern): number[] {
  const { rule, startsOnLocal, startsAtLocal } = pattern
  const startMs = toLocalMs(startsOnLocal, startsAtLocal)
  const dates = expandFloating({ rule, startMs, limit: MAX_OCCURRENCES + 1 })
  if (dates.length > MAX_OCCURRENCES) {
    throw new RangeError(`The rule gives more than ${MAX_OCCURRENCES} dates`)
  }
  return withoutDays(dates, skipDates)
}

/** Leaves out the times that fall on any of the days. */
export function withoutDays(localTimesMs: number[], days: readonly LocalDate[]): number[] {
  if (days.length === 0) return localTimesMs
  const left = new Set(days)
  return localTimesMs.filter((localMs) => !left.has(fromLocalMs(localMs).slice(0, 10)))
}

/** The rule as RRULE text without DTSTART, its parts in a fixed order: equal rules, equal text. */
export function formatRecurrence(rule: Recurrence): string {
  const { freq, interval, byDay, byMonthDay, bySetPos, weekStart, ends } = rule
  return [
    `FREQ=${freq.toUpperCase()}`,
    interval === 1 ? null : `INTERVAL=${interval}`,
    ends.kind === 'count' ? `COUNT=${ends.count}` : `UNTIL=${formatUntil(ends.untilLocal)}`,
    byDay.length === 0
      ? null
      : `BYDAY=${byDay.map(({ nth, weekday }) => `${nth ?? ''}${weekday}`)}`,
    byMonthDay.length === 0 ? null : `BYMONTHDAY=${byMonthDay}`,
    bySetPos.length === 0 ? null : `BYSETPOS=${bySetPos}`,
    weekStart === 'MO' ? null : `WKST=${weekStart}`,
  ]
    .filter((part) => part !== null)
    .join(';')
}

function formatUntil(untilLocal: string): string {
  const figures = untilLocal.replaceAll(/[-:]/g, '')
  return figures.includes('T') ? figures.padEnd(15, '0') : figures
}
