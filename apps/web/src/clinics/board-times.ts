import type { Answer } from '@marram/contract'

export type Board = Answer<'sessions.list'>
export type BoardSession = Board['sessions'][number]

/** The hours that the board shows: the sessions' own, with an hour around them. */
export function hoursOf(board: Board): { from: number; to: number } {
  const starts = board.sessions.map(({ startsAt, zone }) => minutesOfDay(startsAt, zone))
  const ends = board.sessions.map(({ endsAt, zone }) => minutesOfDay(endsAt, zone))
  const from = Math.min(9 * 60, ...starts)
  const to = Math.max(20 * 60, ...ends.map((end) => (end === 0 ? 1440 : end)))
  return { from: Math.floor(from / 60), to: Math.min(24, Math.ceil(to / 60) + 1) }
}

const clocks = new Map<string, Intl.DateTimeFormat>()

/** Minutes after midnight on the venue's own clock. */
export function minutesOfDay(at: string, zone: string): number {
  let clock = clocks.get(zone)
  if (!clock) {
    clock = new Intl.DateTimeFormat('en-GB', { timeZone: zone, hour: '2-digit', minute: '2-digit' })
    clocks.set(zone, clock)
  }
  const [hours = 0, minutes = 0] = clock.format(new Date(at)).split(':').map(Number)
  return hours * 60 + minutes
}

/** The local day of an instant at the venue: "2026-09-17". */
export function dayOfInstant(at: string, zone: string): string {
  return new Intl.DateTimeFormat('en-CA', { timeZone: zone }).format(new Date(at))
}
