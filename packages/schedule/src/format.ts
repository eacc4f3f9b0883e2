/**
 * Dates and times as they stand on a page. This file asks Intl alone and imports nothing, so that
 * the public page can use it without the weight of rules and zones.
 */

/** An instant as code (a Date) or the API (ISO 8601) gives it. */
export type Instant = Date | string

interface AtPlace {
  /** The venue's IANA zone: times are its own. */
  zone: string
  /** A BCP 47 tag: decides the order of day and month, and between 12 and 24 hours. */
  locale: string
}

/** Thu 17 Sep · 17 Sep · 17 September · Thursday 17 September · 17 September 2026 · all of it */
export type DayStyle = 'weekday' | 'short' | 'long' | 'weekday-long' | 'year' | 'full'

/** "Thu 17 Sep, 18:00–19:15"; in the United States "Thu, Sep 17, 6:00–7:15 pm". */
export function formatSessionTime(
  session: { startsAt: Instant; endsAt: Instant } & AtPlace,
): string {
  const { startsAt, endsAt, zone, locale } = session
  const starts = wallClock(startsAt, zone)
  const ends = wallClock(endsAt, zone)
  if (isSameDay(starts, ends))
    return `${styleDay(starts, 'weekday', locale)}, ${range(starts, ends, locale)}`
  const from = `${styleDay(starts, 'weekday', locale)}, ${clockTime(starts, locale)}`
  return `${from}–${styleDay(ends, 'weekday', locale)}, ${clockTime(ends, locale)}`
}

/** "18:00–19:15"; "6:00–7:15 pm", "11:30 am–12:45 pm". */
export function formatTimeRange(span: { startsAt: Instant; endsAt: Instant } & AtPlace): string {
  return range(wallClock(span.startsAt, span.zone), wallClock(span.endsAt, span.zone), span.locale)
}

/** "18:00"; "6:00 pm". */
export function formatTime(time: { at: Instant } & AtPlace): string {
  return clockTime(wallClock(time.at, time.zone), time.locale)
}

/** The day of an instant at the venue: "Thu 17 Sep" unless another style is asked for. */
export function formatDay(day: { at: Instant; style?: DayStyle } & AtPlace): string {
  return styleDay(wallClock(day.at, day.zone), day.style ?? 'weekday', day.locale)
}

/** A calendar day without a zone (`2026-09-17`), as `formatDay`. @throws RangeError for no day. */
export function formatLocalDay(day: {
  dayLocal: string
  locale: string
  style?: DayStyle
}): string {
  return styleDay(wallClock(`${day.dayLocal}T12:00:00Z`, 'UTC'), day.style ?? 'weekday', day.locale)
}

/** A wall clock's time without a zone (`18:00`): "18:00"; "6:00 pm". @throws RangeError for none. */
export function formatLocalTime(time: { timeLocal: string; locale: string }): string {
  return clockTime(wallClock(`2000-01-01T${time.timeLocal}:00Z`, 'UTC'), time.locale)
}

/** 75 → "1 hour 15 minutes"; 60 → "1 hour"; 1 → "1 minute". */
export function formatDuration(durationMinutes: number): string {
  const hours = Math.floor(durationMinutes / 60)
  const minutes = durationMinutes % 60
  const parts = [hours > 0 && countOf(hours, 'hour'), minutes > 0 && countOf(minutes, 'minute')]
  return parts.filter(Boolean).join(' ') || '0 minutes'
}

/** "10 Saturdays" where all days are that, else "10 sessions". Days as `2026-09-19`. */
export function formatSessionCount(daysLocal: readonly string[]): string {
  const weekdays = new Set(daysLocal.map((day) => wallClock(`${day}T12:00:00Z`, 'UTC').weekday))
  const [weekday] = weekdays
  const isOneWeekday = weekdays.size === 1 && new Set(daysLocal).size === daysLocal.length
  return countOf(daysLocal.length, isOneWeekday && weekday !== undefined ? weekday : 'session')
}

/**
 * "Dublin time" where the reader's own clock shows another time at that instant, else null: a zone
 * is named only to someone who is in another.
 */
export function formatZoneIfElsewhere(given: {
  at: Instant
  zone: string
  readerZone: string
}): string | null {
  const here = wallClock(given.at, given.zone)
  const there = wallClock(given.at, given.readerZone)
  const isSame = isSameDay(here, there) && here.hour === there.hour && here.minute === there.minute
  return isSame ? null : `${given.zone.split('/').at(-1)?.replaceAll('_', ' ')} time`
}

interface WallClock {
  weekday: string
  day: string
  month: string
  year: string
  hour: number
  minute: string
}

/** To make a formatter costs far more than to use it, and a page has few zones and locales. */
const clocks = new Map<string, Intl.DateTimeFormat>()
const habits = new Map<string, { isMonthFirst: boolean; isTwelveHour: boolean }>()

function wallClock(at: Instant, zone: string): WallClock {
  let clock = clocks.get(zone)
  if (!clock) {
    clock = new Intl.DateTimeFormat('en-US', {
      timeZone: zone,
      weekday: 'long',
      day: 'numeric',
      month: 'long',
      year: 'numeric',
      hour: '2-digit',
      minute: '2-digit',
      hourCycle: 'h23',
    })
    clocks.set(zone, clock)
  }
  const parts = new Map(clock.formatToParts(new Date(at)).map(({ type, value }) => [type, value]))
  const text = (type: Intl.DateTimeFormatPartTypes) => parts.get(type) ?? ''
  return {
    weekday: text('weekday'),
    day: text('day'),
    month: text('month'),
    year: text('year'),
    hour: Number(text('hour')),
    minute: text('minute'),
  }
}

/** The order and the hours come of the locale; the words are English, as the product is. */
function habitsOf(locale: string) {
  let known = habits.get(locale)
  if (!known) {
    const order = new Intl.DateTimeFormat(locale, { day: 'numeric', month: 'long' })
      .formatToParts(0)
      .map(({ type }) => type)
    const { hourCycle } = new Intl.DateTimeFormat(locale, { hour: 'numeric' }).resolvedOptions()
    known = {
      isMonthFirst: order.indexOf('month') < order.indexOf('day'),
      isTwelveHour: hourCycle === 'h12' || hourCycle === 'h11',
    }
    habits.set(locale, known)
  }
  return known
}

function styleDay(clock: WallClock, style: DayStyle, locale: string): string {
  const { isMonthFirst } = habitsOf(locale)
  const isShort = style === 'weekday' || style === 'short'
  const hasYear = style === 'year' || style === 'full'
  const month = isShort ? clock.month.slice(0, 3) : clock.month
  const date = isMonthFirst ? `${month} ${clock.day}` : `${clock.day} ${month}`
  const dated = hasYear ? `${date}${isMonthFirst ? ',' : ''} ${clock.year}` : date
  if (style === 'short' || style === 'long' || style === 'year') return dated
  const weekday = isShort ? clock.weekday.slice(0, 3) : clock.weekday
  return `${weekday}${isMonthFirst ? ',' : ''} ${dated}`
}

function clockTime(clock: WallClock, locale: string): string {
  if (!habitsOf(locale).isTwelveHour) return twentyFourHour(clock)
  return `${twelveHour(clock)} ${halfOfDay(clock)}`
}

function range(starts: WallClock, ends: WallClock, locale: string): string {
  const saysHalfOnce = habitsOf(locale).isTwelveHour && halfOfDay(starts) === halfOfDay(ends)
  const from =
    saysHalfOnce && isSameDay(starts, ends) ? twelveHour(starts) : clockTime(starts, locale)
  return `${from}–${clockTime(ends, locale)}`
}

function twentyFourHour({ hour, minute }: WallClock): string {
  return `${String(hour).padStart(2, '0')}:${minute}`
}

function twelveHour({ hour, minute }: WallClock): string {
  return `${hour % 12 === 0 ? 12 : hour % 12}:${minute}`
}

function halfOfDay({ hour }: WallClock): 'am' | 'pm' {
  return hour < 12 ? 'am' : 'pm'
}

function isSameDay(one: WallClock, other: WallClock): boolean {
  return one.day === other.day && one.month === other.month && one.year === other.year
}

function countOf(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? '' : 's'}`
}
