import { WEEKDAYS, type Recurrence, type Weekday } from './recurrence'
import type { LocalDate } from './local-time'

const WEEKDAY_NAMES: Readonly<Record<Weekday, string>> = {
  MO: 'Monday',
  TU: 'Tuesday',
  WE: 'Wednesday',
  TH: 'Thursday',
  FR: 'Friday',
  SA: 'Saturday',
  SU: 'Sunday',
}

const ORDINALS = [
  ...['', 'first', 'second', 'third', 'fourth', 'fifth', 'sixth', 'seventh', 'eighth'],
  ...['ninth', 'tenth', 'eleventh', 'twelfth'],
]
const NUMBERS = ['', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine']

/**
 * A rule in plain words, without its end: "Every Tuesday", "Every second Tuesday and Sunday", "The
 * last but one weekday of the month". The words open a sentence and carry no full stop.
 * @param options.startsOnLocal names the day of a rule that says only "weekly" or "monthly".
 */
export function describeRecurrence(
  rule: Recurrence,
  options: { startsOnLocal?: LocalDate } = {},
): string {
  switch (rule.freq) {
    case 'daily':
      return describeDaily(rule)
    case 'weekly':
      return describeWeekly(rule, options.startsOnLocal)
    case 'monthly':
      return describeMonthly(rule, options.startsOnLocal)
  }
}

function describeDaily({ interval, byDay }: Recurrence): string {
  const weekdays = inOrder(byDay.map(({ weekday }) => weekday))
  if (weekdays.length === 0 || weekdays.length === 7) return `Every ${everyNth(interval)}day`
  if (interval === 1) return `Every ${nameSet(weekdays, 'and')}`
  return `Every ${everyNth(interval)}day, when it is a ${nameSet(weekdays, 'or')}`
}

function describeWeekly({ interval, byDay }: Recurrence, startsOnLocal?: LocalDate): string {
  const named = inOrder(byDay.map(({ weekday }) => weekday))
  const weekdays = named.length > 0 ? named : startsOnLocal ? [weekdayOf(startsOnLocal)] : []
  if (weekdays.length === 0) return `Every ${everyNth(interval)}week`
  if (interval === 1) return `Every ${nameSet(weekdays, 'and')}`
  // "Every second weekday" would be Monday, Wednesday, Friday.
  if (isWorkWeek(weekdays)) return `Every weekday of every ${everyNth(interval)}week`
  if (weekdays.length === 7) return `Every day of every ${everyNth(interval)}week`
  return `Every ${everyNth(interval)}${nameSet(weekdays, 'and')}`
}

function describeMonthly(rule: Recurrence, startsOnLocal?: LocalDate): string {
  const { interval, byDay, byMonthDay, bySetPos } = rule
  const months = interval === 1 ? 'the month' : `every ${everyNth(interval)}month`
  const weekdays = inOrder(byDay.map(({ weekday }) => weekday))

  if (byMonthDay.length > 0) {
    const days = nameMonthDays(byMonthDay)
    const onlyWhen = byDay.length === 0 ? '' : `, when it is ${nameCondition(rule, weekdays)}`
    return `The ${days} of ${months}${onlyWhen}`
  }
  if (bySetPos.length > 0) {
    return `The ${join(bySetPos.map(nameNth), 'and')} ${nameSet(weekdays, 'or')} of ${months}`
  }
  if (byDay.some(({ nth }) => nth !== null)) {
    const days = byDay.map(({ nth, weekday }) => `${nameNth(nth ?? 1)} ${WEEKDAY_NAMES[weekday]}`)
    return `The ${join(days, 'and')} of ${months}`
  }
  if (weekdays.length > 0) {
    const every = `Every ${nameSet(weekdays, 'and')}`
    return interval === 1 ? every : `${every} of ${months}`
  }
  if (startsOnLocal) return `The ${nameMonthDays([Number(startsOnLocal.slice(8))])} of ${months}`
  return `Every ${everyNth(interval)}month`
}

/** What a day of the month must be besides: "a Friday", "the first Monday". */
function nameCondition({ byDay }: Recurrence, weekdays: readonly Weekday[]): string {
  if (byDay.every(({ nth }) => nth === null)) return `a ${nameSet(weekdays, 'or')}`
  const days = byDay.map(({ nth, weekday }) => `${nameNth(nth ?? 1)} ${WEEKDAY_NAMES[weekday]}`)
  return `the ${join(days, 'or')}`
}

/** "Tuesday and Sunday"; five working days are "weekday", all seven "day". */
function nameSet(weekdays: readonly Weekday[], word: 'and' | 'or'): string {
  if (weekdays.length === 7) return 'day'
  if (isWorkWeek(weekdays)) return 'weekday'
  const names = weekdays.map((weekday) => WEEKDAY_NAMES[weekday])
  return join(names, word)
}

function nameMonthDays(days: readonly number[]): string {
  const fromStart = days.filter((day) => day > 0).sort((a, b) => a - b)
  const fromEnd = days.filter((day) => day < 0).sort((a, b) => a - b)
  return join([...fromStart.map(figure), ...fromEnd.map((day) => `${nameNth(day)} day`)], 'and')
}

/** 1 → "first", 13 → "13th", -1 → "last", -2 → "last but one", -12 → "12th from last". */
function nameNth(nth: number): string {
  if (nth > 0) return ORDINALS[nth] ?? figure(nth)
  if (nth === -1) return 'last'
  const before = NUMBERS[-nth - 1]
  return before === undefined ? `${figure(-nth)} from last` : `last but ${before}`
}

function everyNth(interval: number): string {
  return interval === 1 ? '' : `${ORDINALS[interval] ?? figure(interval)} `
}

/** 1 → "1st", 12 → "12th", 23 → "23rd". */
function figure(number: number): string {
  const isTeen = number % 100 >= 11 && number % 100 <= 13
  const ending = isTeen ? 'th' : (['th', 'st', 'nd', 'rd'][number % 10] ?? 'th')
  return `${number}${ending}`
}

function join(items: readonly string[], word: 'and' | 'or'): string {
  if (items.length < 2) return items.join('')
  return `${items.slice(0, -1).join(', ')} ${word} ${items.at(-1)}`
}

function inOrder(weekdays: readonly Weekday[]): Weekday[] {
  return WEEKDAYS.filter((weekday) => weekdays.includes(weekday))
}

function isWorkWeek(weekdays: readonly Weekday[]): boolean {
  return weekdays.join() === WEEKDAYS.slice(0, 5).join()
}

function weekdayOf(dayLocal: LocalDate): Weekday {
  const fromSunday = new Date(`${dayLocal}T00:00:00Z`).getUTCDay()
  return WEEKDAYS[(fromSunday + 6) % 7] ?? 'MO'
}
