import { toLocal, toLocalMs, type LocalDate } from './local-time'
import {
  MAX_OCCURRENCES,
  WEEKDAYS,
  type ByDay,
  type Recurrence,
  type RecurrenceEnd,
  type Weekday,
} from './recurrence'

export type RecurrenceRefusal =
  | 'not-a-rule'
  | 'unknown-part'
  | 'repeated-part'
  | 'bad-value'
  | 'endless'
  | 'two-ends'
  | 'too-many'
  | 'parts-disagree'
  | 'until-needs-zone'

export type ParsedRecurrence =
  { ok: true; rule: Recurrence } | { ok: false; reason: RecurrenceRefusal; sentence: string }

const PARTS = [
  'FREQ',
  'INTERVAL',
  'COUNT',
  'UNTIL',
  'BYDAY',
  'BYMONTHDAY',
  'BYSETPOS',
  'WKST',
] as const
type Part = (typeof PARTS)[number]
type Parts = Partial<Record<Part, string>>

const FREQUENCIES = { DAILY: 'daily', WEEKLY: 'weekly', MONTHLY: 'monthly' } as const
const MAX_INTERVAL = 52

class Refusal extends Error {
  constructor(
    readonly reason: RecurrenceRefusal,
    readonly sentence: string,
  ) {
    super(sentence)
  }
}

/**
 * Reads the text of an RRULE (RFC 5545 §3.3.10) of the kinds a clinic may have, before anything
 * expands it: what is unknown, contradictory, endless or too long is refused with a sentence.
 * @param options.zone turns an UNTIL in UTC into the venue's local time; without it it is refused.
 */
export function parseRecurrence(
  rruleText: string,
  options: { zone?: string } = {},
): ParsedRecurrence {
  try {
    const parts = splitParts(rruleText)
    const rule: Recurrence = {
      freq: readFrequency(parts.FREQ),
      interval: readInterval(parts.INTERVAL),
      byDay: readDays(parts.BYDAY),
      bySetPos: readNumbers('BYSETPOS', parts.BYSETPOS, 31),
      byMonthDay: readNumbers('BYMONTHDAY', parts.BYMONTHDAY, 31),
      weekStart: readWeekStart(parts.WKST),
      ends: readEnd(parts, options.zone),
    }
    requireAgreement(rule)
    return { ok: true, rule }
  } catch (error) {
    if (error instanceof Refusal) {
      return { ok: false, reason: error.reason, sentence: error.sentence }
    }
    throw error
  }
}

function splitParts(rruleText: string): Parts {
  const text = rruleText
    .trim()
    .replace(/^RRULE:/i, '')
    .toUpperCase()
  const parts: Parts = {}
  for (const piece of text.split(';')) {
    const [, name, value] = /^([A-Z-]+)=([^=]+)$/.exec(piece) ?? []
    if (name === undefined || value === undefined) {
      throw new Refusal(
        'not-a-rule',
        'This is not a rule for dates, like FREQ=WEEKLY;BYDAY=TU;COUNT=8.',
      )
    }
    const part = PARTS.find((known) => known === name)
    if (part === undefined) {
      throw new Refusal('unknown-part', `A clinic's rule has no ${name.slice(0, 20)}.`)
    }
    if (parts[part] !== undefined) {
      throw new Refusal('repeated-part', `${part} may stand in the rule once only.`)
    }
    parts[part] = value
  }
  return parts
}

function readFrequency(text = ''): Recurrence['freq'] {
  const known = Object.entries(FREQUENCIES).find(([name]) => name === text)
  if (known) return known[1]
  throw new Refusal('bad-value', 'A clinic meets daily, weekly or monthly.')
}

function readInterval(text = '1'): number {
  const interval = readWhole(text)
  if (interval >= 1 && interval <= MAX_INTERVAL) return interval
  throw new Refusal('bad-value', `The interval is a whole number from 1 to ${MAX_INTERVAL}.`)
}

function readDays(text: string | undefined): ByDay[] {
  if (text === undefined) return []
  const days = text.split(',').map((item): ByDay => {
    const [, nth, name] = /^([+-]?[1-5])?([A-Z]{2})$/.exec(item) ?? []
    const weekday = WEEKDAYS.find((known) => known === name)
    if (weekday !== undefined) return { weekday, nth: nth === undefined ? null : Number(nth) }
    throw new Refusal(
      'bad-value',
      'Days are MO, TU, WE, TH, FR, SA or SU, or 2TU, -1FR in a month.',
    )
  })
  const isOwn = new Set(days.map(({ nth, weekday }) => `${nth}${weekday}`)).size === days.length
  if (!isOwn) throw new Refusal('repeated-part', 'Each day may stand in BYDAY once only.')
  return days
}

function readNumbers(part: Part, text: string | undefined, max: number): number[] {
  if (text === undefined) return []
  const numbers = text.split(',').map(readWhole)
  if (!numbers.every((number) => number !== 0 && Math.abs(number) <= max)) {
    throw new Refusal('bad-value', `${part} has whole numbers from 1 to ${max}, or -1 to -${max}.`)
  }
  if (new Set(numbers).size < numbers.length) {
    throw new Refusal('repeated-part', `Each number may stand in ${part} once only.`)
  }
  return numbers
}

function readWeekStart(text = 'MO'): Weekday {
  const weekday = WEEKDAYS.find((known) => known === text)
  if (weekday) return weekday
  throw new Refusal('bad-value', 'A week starts on one of MO, TU, WE, TH, FR, SA or SU.')
}

function readEnd({ COUNT, UNTIL }: Parts, zone: string | undefined): RecurrenceEnd {
  if (COUNT !== undefined && UNTIL !== undefined) {
    throw new Refusal('two-ends', 'Say how many sessions or until which day, not both.')
  }
  if (COUNT !== undefined) return { kind: 'count', count: readCount(COUNT) }
  if (UNTIL !== undefined) return { kind: 'until', untilLocal: readUntil(UNTIL, zone) }
  throw new Refusal('endless', 'Say how many sessions there are, or until which day.')
}

function readCount(text: string): number {
  const count = readWhole(text)
  if (count > MAX_OCCURRENCES) throw new Refusal('too-many', TOO_MANY_SENTENCE)
  if (count >= 1) return count
  throw new Refusal('bad-value', 'The number of sessions is a whole number of at least 1.')
}

export const TOO_MANY_SENTENCE = `A run has at most ${MAX_OCCURRENCES} sessions.`

function readUntil(text: string, zone: string | undefined): string {
  const [, y, m, d, time, isUtc] = /^(\d{4})(\d\d)(\d\d)(?:T(\d{6})(Z)?)?$/.exec(text) ?? []
  const dayLocal: LocalDate = `${y}-${m}-${d}`
  const [hours, minutes, seconds] = [0, 2, 4].map((at) => (time ?? '000000').slice(at, at + 2))
  const untilMs = readLocalMs(dayLocal, `${hours}:${minutes}`)
  if (untilMs === null || Number(seconds) > 59) {
    throw new Refusal('bad-value', 'The last day looks like 20261020, for 20 October 2026.')
  }
  if (time === undefined) return dayLocal
  if (isUtc === undefined) return `${dayLocal}T${hours}:${minutes}`
  if (zone === undefined) {
    throw new Refusal('until-needs-zone', "Please give the last day in the venue's own time.")
  }
  const local = toLocal({ at: new Date(untilMs), zone })
  return `${local.dayLocal}T${local.timeLocal}`
}

function readLocalMs(dayLocal: LocalDate, timeLocal: string): number | null {
  try {
    return toLocalMs(dayLocal, timeLocal)
  } catch {
    return null
  }
}

/** What RFC 5545 forbids together, and the few things no sentence could say. */
function requireAgreement({ freq, byDay, bySetPos, byMonthDay }: Recurrence): void {
  const hasNth = byDay.some(({ nth }) => nth !== null)
  const isMixed = hasNth && byDay.some(({ nth }) => nth === null)
  if (freq !== 'monthly' && (hasNth || byMonthDay.length > 0 || bySetPos.length > 0)) {
    throw new Refusal('parts-disagree', 'Only a monthly rule can name days of the month.')
  }
  if (bySetPos.length > 0 && (byDay.length === 0 || hasNth || byMonthDay.length > 0)) {
    throw new Refusal('parts-disagree', 'BYSETPOS chooses among weekdays, like BYDAY=MO,TU.')
  }
  if (isMixed) {
    throw new Refusal('parts-disagree', 'Number all the weekdays of a month, or none of them.')
  }
}

/** A whole number as RFC 5545 writes one, else NaN: no 1e3, no 0x10, no blank. */
function readWhole(text: string): number {
  return /^[+-]?\d{1,6}$/.test(text) ? Number(text) : NaN
}
