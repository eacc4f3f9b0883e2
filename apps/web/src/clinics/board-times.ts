import type { Answer } from '@marram/contract'
import { formatLocalTime } from '@marram/schedule/format'
import { localDayOf, localTimeOf } from '../academies/local-day'

export type Board = Answer<'sessions.list'>
export type BoardSession = Board['sessions'][number]

const MINUTES_OF_A_DAY = 24 * 60

/** Minutes after midnight on the venue's own clock. */
export function minutesOfDay(at: string | number, zone: string): number {
  const [hours = 0, minutes = 0] = localTimeOf(at, zone).split(':').map(Number)
  return hours * 60 + minutes
}

/** Where a session stands in the day it starts on, in minutes; what runs over midnight ends there. */
export function spanOf({ startsAt, endsAt, zone }: Timed) {
  const isOver = localDayOf(endsAt, zone) !== localDayOf(startsAt, zone)
  return {
    from: minutesOfDay(startsAt, zone),
    to: isOver ? MINUTES_OF_A_DAY : minutesOfDay(endsAt, zone),
  }
}

/** The hours that the board shows: the sessions' own, with an hour around them. */
export function hoursOf({ sessions }: { sessions: readonly Timed[] }) {
  const spans = sessions.map(spanOf)
  const from = Math.min(9 * 60, ...spans.map((span) => span.from))
  const to = Math.max(20 * 60, ...spans.map((span) => span.to))
  return { from: Math.floor(from / 60), to: Math.min(24, Math.ceil(to / 60) + 1) }
}

type Timed = Pick<BoardSession, 'startsAt' | 'endsAt' | 'zone'>

/** "18:00" of minutes after midnight. */
export function timeLocalOf(minutes: number): string {
  const [hours, rest] = [Math.floor(minutes / 60), minutes % 60]
  return `${String(hours).padStart(2, '0')}:${String(rest).padStart(2, '0')}`
}

/** A full hour in as little room as it takes: "18", in the United States "6 pm". */
export function hourInShort(hour: number, locale: string): string {
  const time = formatLocalTime({ timeLocal: timeLocalOf(hour * 60), locale })
  return time.replace(':00', '').replace(/^0(?=\d)/, '')
}
