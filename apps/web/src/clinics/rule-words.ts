import { localDayOf, weekdayOf } from '../academies/local-day'

/** What a clinic's sentence says of its rule: how often, on which days, and how long it goes on. */
export interface RuleWords {
  interval: string
  /** As RFC 5545 writes them: MO, TU. */
  weekdays: string[]
  /** How many sessions; empty where the run goes on until a day. */
  sessions: string
  /** The last day, "2026-10-20"; empty where sessions are counted. */
  lastDay: string
}

/** A rule as it was saved, with what it needs to be read. */
export interface SavedRule {
  rrule: string
  startsOnLocal: string
  zone: string
  /** In plain words, for a rule that the sentence has none for. */
  recurrence: string
}

export const WEEKDAYS = ['MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU'] as const

/** The weekday of a local day. */
export function dayCodeOf(day: string): string {
  return WEEKDAYS[weekdayOf(day)] ?? 'MO'
}

/** The words for a saved rule; null for one that is not weekly, which the sentence cannot say. */
export function wordsOfRule({ rrule, startsOnLocal, zone }: Omit<SavedRule, 'recurrence'>) {
  const parts = partsOf(rrule)
  const isWeekly = parts.get('FREQ') === 'WEEKLY'
  if (!isWeekly || parts.has('BYMONTHDAY') || parts.has('BYSETPOS')) return null
  const until = parts.get('UNTIL')
  return {
    interval: parts.get('INTERVAL') ?? '1',
    weekdays: parts.get('BYDAY')?.split(',') ?? [dayCodeOf(startsOnLocal)],
    sessions: parts.get('COUNT') ?? '',
    lastDay: until ? untilDay(until, zone) : '',
  } satisfies RuleWords
}

/**
 * The rule of the words. Of a saved rule only those parts change whose words are another; what the
 * sentence has no words for stays as it was.
 */
export function ruleOf(words: RuleWords, saved: SavedRule | null): string {
  const before = saved && wordsOfRule(saved)
  if (saved && !before) return saved.rrule
  const parts = partsOf(saved?.rrule ?? 'FREQ=WEEKLY')
  if (words.interval !== (before?.interval ?? '1')) {
    if (words.interval === '1') parts.delete('INTERVAL')
    else parts.set('INTERVAL', words.interval)
  }
  if (words.weekdays.join() !== before?.weekdays.join()) {
    parts.set('BYDAY', words.weekdays.join())
  }
  if (words.lastDay !== '' && words.lastDay !== before?.lastDay) {
    parts.delete('COUNT')
    parts.set('UNTIL', words.lastDay.replaceAll('-', ''))
  }
  if (words.lastDay === '' && words.sessions !== before?.sessions) {
    parts.delete('UNTIL')
    parts.set('COUNT', words.sessions)
  }
  return [...parts].map(([name, value]) => `${name}=${value}`).join(';')
}

function partsOf(rrule: string): Map<string, string> {
  return new Map(
    rrule.split(';').map((part) => {
      const [name = '', value = ''] = part.split('=')
      return [name, value]
    }),
  )
}

/** The local day of an UNTIL: a day, a local time, or with a Z an instant. */
function untilDay(text: string, zone: string): string {
  const day = `${text.slice(0, 4)}-${text.slice(4, 6)}-${text.slice(6, 8)}`
  if (!text.endsWith('Z')) return day
  const time = `${text.slice(9, 11)}:${text.slice(11, 13)}:${text.slice(13, 15)}`
  return localDayOf(`${day}T${time}Z`, zone)
}
