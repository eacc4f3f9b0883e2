import { spawnSync } from 'node:child_process'
import { resolve } from 'node:path'
import type { MailFake } from '@marram/fakes'
import ICAL from 'ical.js'

type Letter = MailFake['messages'][number]

/** What a calendar program makes of the calendar part of a letter. */
export interface ReadCalendar {
  method: string
  zones: string[]
  uids: string[]
  sequences: number[]
  organizers: string[]
  statuses: string[]
  /** Instants at which something begins, with moved sessions where they were moved to. */
  starts: string[]
  /** Of each session that was moved: when it would have begun, and when it does. */
  overrides: [string, string][]
}

/** The one calendar part of a letter, with the method that the mail says it has. */
export function calendarPart({ attachments }: Letter): { method: string; text: string } {
  const [part, ...others] = attachments
  const method = /^text\/calendar; method=(\w+)$/.exec(part?.type ?? '')?.[1]
  if (!part || !method || others.length > 0) throw new Error('a letter has one calendar part')
  return { method, text: Buffer.from(part.content, 'base64').toString('utf8') }
}

/** Reads a part with the icalendar package of Python, which has never heard of what wrote it. */
export function readWithIcalendar(text: string): ReadCalendar {
  const script = resolve('tests/reference/read-calendar.py')
  const ran = spawnSync('/usr/bin/python3', [script], { input: text, encoding: 'utf8' })
  if (ran.status !== 0) throw new Error(ran.stderr)
  // The script prints this shape.
  return JSON.parse(ran.stdout) as ReadCalendar
}

/** Reads a part with ical.js, by the zone that the part itself brings along. */
export function readWithIcalJs(text: string): ReadCalendar {
  const calendar = new ICAL.Component(ICAL.parse(text) as unknown[])
  const zones = calendar.getAllSubcomponents('vtimezone')
  for (const zone of zones) ICAL.TimezoneService.register(zone)
  const events = calendar
    .getAllSubcomponents('vevent')
    .map((component) => new ICAL.Event(component, { strictExceptions: true }))
  const plain = events.filter((event) => !event.isRecurrenceException())
  const moved = events.filter((event) => event.isRecurrenceException())
  const overrides = moved.map((event): [string, string] => [
    instantOf(event.recurrenceId),
    instantOf(event.startDate),
  ])
  const replaced = new Map(overrides)
  const textOf = (name: string) => [
    ...new Set(events.map((event) => String(event.component.getFirstPropertyValue(name)))),
  ]
  return {
    method: String(calendar.getFirstPropertyValue('method')),
    zones: zones.map((zone) => String(zone.getFirstPropertyValue('tzid'))),
    uids: textOf('uid').sort(),
    sequences: textOf('sequence').map(Number).sort(),
    organizers: textOf('organizer').sort(),
    statuses: textOf('status').sort(),
    starts: plain
      .flatMap(startsOf)
      .map((start) => replaced.get(start) ?? start)
      .sort(),
    overrides: overrides.sort(([a], [b]) => a.localeCompare(b)),
  }
}

/** More than any run here has; a rule without an end would go on for ever. */
const MOST_STARTS = 100

function startsOf(event: ICAL.Event): string[] {
  if (!event.isRecurring()) return [instantOf(event.startDate)]
  const starts: string[] = []
  // The library's types leave out that an iterator ends with nothing.
  const following = event.iterator() as { next(): ICAL.Time | undefined }
  for (let next = following.next(); next; next = following.next()) {
    starts.push(instantOf(next))
    if (starts.length > MOST_STARTS) throw new Error('this entry recurs for ever')
  }
  return starts
}

const instantOf = (time: ICAL.Time): string => time.toJSDate().toISOString()
