import ical, { ICalCalendarMethod, ICalEventStatus, type ICalCalendar } from 'ical-generator'
import { datesOfRun, parseRecurrence, toLocal } from '@marram/schedule'
import { tzlib_get_ical_block } from 'timezones-ical-library'

export interface CalendarSession {
  number: number
  startsAt: Date
  endsAt: Date
  /** Whether the golfer has a place in it: not called off, not given up. */
  isOn: boolean
}

export interface CalendarEntry {
  /** Lives as long as the enrolment. */
  uid: string
  /** Rises with each change. */
  sequence: number
  method: 'REQUEST' | 'CANCEL'
  title: string
  description: string
  location: string
  url: string
  zone: string
  organizer: { name: string; email: string }
  attendee: { name: string; email: string }
  stamp: Date
  sessions: readonly CalendarSession[]
  /** For a run: the clinic's rule, so that one entry recurs and moved sessions override it. */
  run: {
    rrule: string
    startsOnLocal: string
    startsAtLocal: string
    durationMinutes: number
    skipDates: readonly string[]
  } | null
}

/**
 * The calendar part of a mail (RFC 5545, RFC 5546): one VEVENT for a session; for a run one recurring
 * VEVENT, without the days that are off, and an override for each session that was moved.
 */
export function writeCalendar(entry: CalendarEntry): string {
  const method = entry.method === 'CANCEL' ? ICalCalendarMethod.CANCEL : ICalCalendarMethod.REQUEST
  const calendar = ical({
    method,
    prodId: { company: 'Marram', product: 'Marram', language: 'EN' },
  })
  calendar.timezone({
    name: null,
    generator: (zone: string) => {
      const [block] = tzlib_get_ical_block(zone) as string[]
      return block ?? null
    },
  })
  const on = entry.sessions.filter(({ isOn }) => isOn)
  const run = entry.run && runOf(entry, entry.run)
  if (!run) {
    for (const session of entry.method === 'CANCEL' ? entry.sessions : on) {
      addEvent(calendar, entry, session)
    }
    return calendar.toString()
  }
  addEvent(calendar, entry, run.first).repeating(run.repeating)
  for (const { session, recurrenceId } of run.moved) {
    addEvent(calendar, entry, session).recurrenceId(recurrenceId)
  }
  return calendar.toString()
}

function addEvent(
  calendar: ICalCalendar,
  entry: CalendarEntry,
  { startsAt, endsAt }: { startsAt: Date; endsAt: Date },
) {
  const event = calendar.createEvent({
    id: entry.uid,
    sequence: entry.sequence,
    stamp: entry.stamp,
    start: localText(startsAt, entry.zone),
    end: localText(endsAt, entry.zone),
    timezone: entry.zone,
    summary: entry.title,
    description: entry.description,
    location: entry.location,
    url: entry.url,
    organizer: entry.organizer,
    status: entry.method === 'CANCEL' ? ICalEventStatus.CANCELLED : ICalEventStatus.CONFIRMED,
  })
  event.createAttendee({ ...entry.attendee, rsvp: false })
  return event
}

interface WrittenRun {
  first: { startsAt: Date; endsAt: Date }
  repeating: string
  moved: { session: CalendarSession; recurrenceId: string }[]
}

/** Null for one session, or for a rule that cannot be read: then each session stands alone. */
function runOf(
  entry: CalendarEntry,
  pattern: NonNullable<CalendarEntry['run']>,
): WrittenRun | null {
  const parsed = parseRecurrence(pattern.rrule, { zone: entry.zone })
  if (!parsed.ok || entry.sessions.length < 2) return null
  const { zone } = entry
  const given = { ...pattern, zone, rule: parsed.rule }
  const original = new Map(datesOfRun(given).map((date) => [date.number, date]))
  const mine = entry.sessions.filter(({ number }) => original.has(number))
  const [firstMine] = mine
  const lastMine = mine.at(-1)
  const first = firstMine && original.get(firstMine.number)
  const last = lastMine && original.get(lastMine.number)
  if (!first || !last) return null
  const isMine = new Map(mine.map((session) => [session.number, session]))
  const within = [...original.values()].filter(
    ({ number }) => number >= first.number && number <= last.number,
  )
  const off = [
    ...within
      .filter(({ number }) => entry.method === 'REQUEST' && !isMine.get(number)?.isOn)
      .map(({ startsAt }) => stampText(localText(startsAt, zone))),
    ...pattern.skipDates
      .filter((day) => day > first.startsOnLocal && day < last.startsOnLocal)
      .map((day) => stampText(`${day}T${pattern.startsAtLocal}:00`)),
  ]
  const parts = pattern.rrule.split(';').filter((part) => !/^(COUNT|UNTIL)=/.test(part))
  const until = `UNTIL=${stampText(last.startsAt.toISOString().slice(0, 19))}Z`
  const exclusions = off.map((stamp) => `\nEXDATE;TZID=${zone}:${stamp}`).join('')
  return {
    first,
    repeating: `RRULE:${[...parts, until].join(';')}${exclusions}`,
    moved: within.flatMap(({ number, startsAt, endsAt }) => {
      const session = isMine.get(number)
      if (!session?.isOn) return []
      const isMoved = +session.startsAt !== +startsAt || +session.endsAt !== +endsAt
      return isMoved ? [{ session, recurrenceId: localText(startsAt, zone) }] : []
    }),
  }
}

/** "2026-10-06T17:15:00" on the venue's clocks: the form that keeps the wall time whatever happens. */
function localText(at: Date, zone: string): string {
  const { dayLocal, timeLocal } = toLocal({ at, zone })
  return `${dayLocal}T${timeLocal}:00`
}

const stampText = (text: string): string => text.replace(/[-:]/g, '')
