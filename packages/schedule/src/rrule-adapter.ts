import * as rrule from 'rrule'
import type { Recurrence } from './recurrence'

/**
 * The one place that knows rrule. Its own handling of zones is not used, since its results change
 * with the process's TZ: all it sees are local times dressed up as UTC.
 */
// Bundlers see rrule's module build with named exports, Node its script build with a default one.
const { RRule } =
  (rrule as { RRule?: typeof rrule.RRule }).RRule === undefined
    ? (rrule as unknown as { default: typeof rrule }).default
    : rrule

const FREQUENCIES = { daily: RRule.DAILY, weekly: RRule.WEEKLY, monthly: RRule.MONTHLY }

/** Where a rule that never matches is given up: 31 February is sought no longer than this. */
const HORIZON_YEARS = 50

/**
 * The dates of a rule from `startMs` on, in milliseconds of local time read as UTC, at most
 * `limit` of them. A start that does not match the rule is not one of its dates.
 * @param given.count replaces the rule's own number of dates.
 */
export function expandFloating(given: {
  rule: Recurrence
  startMs: number
  limit: number
  count?: number
}): number[] {
  const { rule, startMs, limit } = given
  // rrule drops milliseconds of the start but compares UNTIL with them.
  const start = new Date(Math.floor(startMs / 1000) * 1000)
  const horizon = new Date(start)
  horizon.setUTCFullYear(start.getUTCFullYear() + HORIZON_YEARS)

  const dates = new RRule(
    {
      freq: FREQUENCIES[rule.freq],
      interval: rule.interval,
      dtstart: start,
      wkst: RRule[rule.weekStart],
      until: new Date(Math.min(untilMs(rule), horizon.valueOf())),
      ...(rule.ends.kind === 'count' && { count: given.count ?? rule.ends.count }),
      ...(rule.byDay.length > 0 && {
        byweekday: rule.byDay.map(({ weekday, nth }) =>
          nth === null ? RRule[weekday] : RRule[weekday].nth(nth),
        ),
      }),
      ...(rule.byMonthDay.length > 0 && { bymonthday: [...rule.byMonthDay] }),
      ...(rule.bySetPos.length > 0 && { bysetpos: [...rule.bySetPos] }),
    },
    true,
  ).all((_date, index) => index < limit)
  return dates.map((date) => date.valueOf())
}

function untilMs({ ends }: Recurrence): number {
  if (ends.kind === 'count') return Infinity
  const hasTime = ends.untilLocal.includes('T')
  return Date.parse(hasTime ? `${ends.untilLocal}Z` : `${ends.untilLocal}T23:59:59Z`)
}
