import { describeRecurrence } from './describe-recurrence'
import { fromLocalMs, instantReader, toLocalMs, type LocalDate } from './local-time'
import { parseRecurrence, TOO_MANY_SENTENCE, type RecurrenceRefusal } from './parse-recurrence'
import {
  expandLocalMs,
  MAX_OCCURRENCES,
  withoutDays,
  type LocalPattern,
  type Recurrence,
} from './recurrence'
import { expandFloating } from './rrule-adapter'

/** One dated meeting of a clinic. */
export interface RunDate {
  /** From 1, in order of time. */
  number: number
  startsOnLocal: LocalDate
  startsAt: Date
  endsAt: Date
}

export interface RunPattern extends LocalPattern {
  /** How long a session lasts, on any clock: it does not change when the clocks do. */
  durationMinutes: number
  /** The venue's IANA zone, `Europe/Dublin`. */
  zone: string
}

/**
 * The dates of a rule as instants, without the days left out, numbered as they are held. As in RFC
 * 5545, a day left out counts towards COUNT; see `datesOfRun`.
 * @throws RangeError for a day, a time or a zone that does not exist, and for over 400 dates.
 */
export function expandInstants(pattern: RunPattern): RunDate[] {
  return toRunDates(expandLocalMs(pattern), pattern)
}

/**
 * The dates a run is held on. A run of six sessions that leaves out a day is still of six: it goes
 * on past the day left out. A run until a day ends there, however many are left.
 * @throws RangeError as `expandInstants`.
 */
export function datesOfRun(pattern: RunPattern): RunDate[] {
  const { rule, skipDates = [] } = pattern
  if (rule.ends.kind === 'until') return expandInstants(pattern)
  const dates = expandFloating({
    rule,
    startMs: toLocalMs(pattern.startsOnLocal, pattern.startsAtLocal),
    count: rule.ends.count + skipDates.length,
    limit: MAX_OCCURRENCES + skipDates.length,
  })
  return toRunDates(withoutDays(dates, skipDates).slice(0, rule.ends.count), pattern)
}

export type PlannedRun =
  | { ok: true; rule: Recurrence; description: string; dates: RunDate[] }
  | { ok: false; reason: RecurrenceRefusal | 'no-dates' | 'too-few-dates'; sentence: string }

/**
 * From the text of a rule to the dates of its run, with every refusal in words: what an editor and
 * the API need in one step.
 * @throws RangeError for a day, a time or a zone that does not exist: those come checked.
 */
export function planRun(pattern: Omit<RunPattern, 'rule'> & { rruleText: string }): PlannedRun {
  const { rruleText, ...rest } = pattern
  const parsed = parseRecurrence(rruleText, { zone: pattern.zone })
  if (!parsed.ok) return parsed
  const { rule } = parsed
  if (rule.ends.kind === 'until' && hasTooMany(rule, pattern)) {
    return { ok: false, reason: 'too-many', sentence: TOO_MANY_SENTENCE }
  }
  const dates = datesOfRun({ ...rest, rule })
  if (dates.length === 0) {
    return { ok: false, reason: 'no-dates', sentence: 'This gives no date at all.' }
  }
  if (rule.ends.kind === 'count' && dates.length < rule.ends.count) {
    const sentence = `This gives ${dates.length} dates in fifty years, not ${rule.ends.count}.`
    return { ok: false, reason: 'too-few-dates', sentence }
  }
  return { ok: true, rule, description: describeRecurrence(rule, pattern), dates }
}

function hasTooMany(rule: Recurrence, pattern: Omit<LocalPattern, 'rule'>): boolean {
  const startMs = toLocalMs(pattern.startsOnLocal, pattern.startsAtLocal)
  const limit = MAX_OCCURRENCES + 1
  return expandFloating({ rule, startMs, limit }).length === limit
}

function toRunDates(localTimesMs: readonly number[], pattern: RunPattern): RunDate[] {
  const [first] = localTimesMs
  const last = localTimesMs.at(-1)
  if (first === undefined || last === undefined) return []
  const read = instantReader({ zone: pattern.zone, fromLocalMs: first, toLocalMs: last })
  return localTimesMs.map((localMs, index) => {
    const startsAtMs = read(localMs)
    return {
      number: index + 1,
      startsOnLocal: fromLocalMs(localMs).slice(0, 10),
      startsAt: new Date(startsAtMs),
      endsAt: new Date(startsAtMs + pattern.durationMinutes * 60_000),
    }
  })
}
