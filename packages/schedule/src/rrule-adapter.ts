import * as rrule from 'rrule'
import type { Recurrence } from './recurrence'

/**
 * The one place that knows rrule. Its own handling of zones is not used, since its results change
 * with the process's TZ: all it sees are local times dressed up as UTC.
 */
// Bundlers find rrule's module build, with named exports; Node its script build, with a default one.
// A copy, since a bundler warns of a name that is not among a module's exports.
const library: Partial<typeof rrule> & { default?: typeof rrule } = { ...rrule }
const { RRule } = library.default ?? rrule

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
  const dates: number[] = []
  const take = (dateMs: number): boolean => {
    if (dateMs >= span.startMs && dateMs <= span.endMs) dates.push(dateMs)
    return dates.length < span.most
  }
  if (rule.bySetPos.length > 0) visitPositions(rule, span, take)
  else visitMatches(rule, span, take)
  return dates
}

interface Span {
  startMs: number
  endMs: number
}

/** Takes a date and says whether another is wanted. */
type Visitor = (dateMs: number) => boolean

/** Shows all that the rule matches, its BYSETPOS aside, in order. */
function visitMatches(rule: Recurrence, { startMs, endMs }: Span, visit: Visitor): void {
  // Where a day must pass two tests, that of the weekday is made here: rrule looks at its end only
  // when a day has passed both, and would seek a rule that never matches until the year 9999.
  const testsWeekdayHere = rule.freq === 'daily' || rule.byMonthDay.length > 0
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
  if (testsWeekdayHere) delete options.byweekday
  new RRule(options, true).all(
    (date) => (testsWeekdayHere && !isAmong(rule.byDay, date)) || visit(date.valueOf()),
  )
}

/**
 * Shows the chosen places among each month's matches, counted over the whole month even where the
 * run begins or ends within it. Not left to rrule, which gives a day twice that is both the first
 * and the last, and some days out of order.
 */
function visitPositions(rule: Recurrence, { startMs, endMs }: Span, visit: Visitor): void {
  let month: number[] = []
  const visitChosen = (): boolean => {
    const chosen = new Set(rule.bySetPos.map((place) => month.at(place > 0 ? place - 1 : place)))
    return month.filter((dateMs) => chosen.has(dateMs)).every(visit)
  }
  const whole = { startMs: startOfMonth(startMs), endMs: endOfMonth(endMs) }
  visitMatches(rule, whole, (dateMs) => {
    const isSameMonth = startOfMonth(month[0] ?? dateMs) === startOfMonth(dateMs)
    const isMoreWanted = isSameMonth || visitChosen()
    month = isSameMonth ? [...month, dateMs] : isMoreWanted ? [dateMs] : []
    return isMoreWanted
  })
  visitChosen()
}

/** Whether a day is one of those named; a rule that names none means every day. */
function isAmong(byDay: Recurrence['byDay'], date: Date): boolean {
  const fromStart = date.getUTCDate()
  const lastDay = new Date(Date.UTC(date.getUTCFullYear(), date.getUTCMonth() + 1, 0)).getUTCDate()
  const nthFromStart = Math.ceil(fromStart / 7)
  const nthFromEnd = -Math.ceil((lastDay - fromStart + 1) / 7)
  const isOne = byDay.some(
    ({ weekday, nth }) =>
      // JavaScript counts from Sunday, rrule from Monday.
      RRule[weekday].weekday === (date.getUTCDay() + 6) % 7 &&
      (nth === null || nth === nthFromStart || nth === nthFromEnd),
  )
  return isOne || byDay.length === 0
}

function horizonMs(startMs: number): number {
  const start = new Date(startMs)
  return start.setUTCFullYear(start.getUTCFullYear() + HORIZON_YEARS)
}

/** The first day of the month, at the same time. */
function startOfMonth(localMs: number): number {
  return new Date(localMs).setUTCDate(1)
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
