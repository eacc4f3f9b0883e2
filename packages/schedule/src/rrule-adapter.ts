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
  const { rule, startMs } = given
  const ownCount = rule.ends.kind === 'count' ? rule.ends.count : Infinity
  const span = {
    startMs,
    endMs: Math.min(untilMs(rule), horizonMs(startMs)),
    most: Math.min(given.limit, given.count ?? ownCount),
  }
  return rule.bySetPos.length > 0 ? pickPositions(rule, span) : expand(rule, span)
}

interface Span {
  startMs: number
  endMs: number
  most: number
}

/** All that the rule matches, its BYSETPOS aside. */
function expand(rule: Recurrence, { startMs, endMs, most }: Span): number[] {
  const options = {
    freq: FREQUENCIES[rule.freq],
    interval: rule.interval,
    dtstart: new Date(startMs),
    until: new Date(endMs),
    wkst: RRule[rule.weekStart],
    ...(rule.byDay.length > 0 && {
      byweekday: rule.byDay.map(({ weekday, nth }) =>
        nth === null ? RRule[weekday] : RRule[weekday].nth(nth),
      ),
    }),
    ...(rule.byMonthDay.length > 0 && { bymonthday: [...rule.byMonthDay] }),
  }
  const dates = new RRule(options, true).all((_date, index) => index < most)
  return dates.map((date) => date.valueOf())
}

/**
 * BYSETPOS of a monthly rule: the chosen places among each month's matches, counted over the whole
 * month even where the run begins or ends within it. Not left to rrule, which gives a day twice
 * that is both the first and the last, and some days out of order.
 */
function pickPositions(rule: Recurrence, { startMs, endMs, most }: Span): number[] {
  const months = new Map<string, number[]>()
  const whole = { startMs: startOfMonth(startMs), endMs: endOfMonth(endMs) }
  const enough = (most + 1) * MOST_DAYS_IN_MONTH
  for (const dateMs of expand(rule, { ...whole, most: enough })) {
    const month = new Date(dateMs).toISOString().slice(0, 7)
    months.set(month, [...(months.get(month) ?? []), dateMs])
  }
  return [...months.values()]
    .flatMap((dates) => {
      const chosen = new Set(rule.bySetPos.map((place) => dates.at(place > 0 ? place - 1 : place)))
      return dates.filter((dateMs) => chosen.has(dateMs))
    })
    .filter((dateMs) => dateMs >= startMs && dateMs <= endMs)
    .slice(0, most)
}

const MOST_DAYS_IN_MONTH = 31

function horizonMs(startMs: number): number {
  const horizon = new Date(startMs)
  return horizon.setUTCFullYear(horizon.getUTCFullYear() + HORIZON_YEARS)
}

function startOfMonth(localMs: number): number {
  const day = new Date(localMs)
  return day.setUTCDate(1)
}

function endOfMonth(localMs: number): number {
  const day = new Date(localMs)
  return Date.UTC(day.getUTCFullYear(), day.getUTCMonth() + 1) - 1000
}

function untilMs({ ends }: Recurrence): number {
  if (ends.kind === 'count') return Infinity
  const hasTime = ends.untilLocal.includes('T')
  return Date.parse(hasTime ? `${ends.untilLocal}Z` : `${ends.untilLocal}T23:59:59Z`)
}
