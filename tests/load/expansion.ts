import * as rrule from 'rrule'
import { expandInstants, parseRecurrence } from '@marram/schedule'
import { find, type Finding } from './rounds'

/** The library is CommonJS: Node.js gives its names inside a default export, bundlers beside it. */
const { RRule } = 'default' in rrule ? (rrule.default as typeof rrule) : rrule

const TEXTS = [
  'FREQ=WEEKLY;BYDAY=TU;COUNT=8',
  'FREQ=WEEKLY;BYDAY=TU,TH;COUNT=40',
  'FREQ=WEEKLY;INTERVAL=2;BYDAY=TU,SU;COUNT=20',
  'FREQ=MONTHLY;BYMONTHDAY=15;COUNT=12',
  'FREQ=DAILY;COUNT=60',
]
const ZONES = ['Europe/Dublin', 'America/Denver', 'Australia/Sydney', 'America/Phoenix']
const ROUNDS = 100
const TIMES = 5

/**
 * A season's rules as instants in their zones, against the local dates alone from the library.
 * Rounds in turn, and of each the fastest: a few milliseconds are slowed by others only.
 */
export function measureExpansion(): Finding {
  const rules = TEXTS.map(parsed)
  const options = TEXTS.map((text) => ({
    ...RRule.parseString(text),
    dtstart: new Date(Date.UTC(2026, 3, 6, 18)),
  }))
  const alone = () => ZONES.map(() => options.map((option) => new RRule(option, true).all()))
  const whole = () =>
    ZONES.map((zone) =>
      rules.map((rule) =>
        expandInstants({
          rule,
          startsOnLocal: '2026-04-06',
          startsAtLocal: '18:00',
          durationMinutes: 75,
          zone,
        }),
      ),
    )
  let [ours, floor] = [Infinity, Infinity]
  for (let round = 0; round < ROUNDS; round += 1) {
    floor = Math.min(floor, millisecondsOf(alone))
    ours = Math.min(ours, millisecondsOf(whole))
  }
  return find({
    name: 'recurrences as instants, rrule alone',
    unit: 'ms',
    ours,
    floor,
    goal: { at: 'most', ratio: 2 },
  })
}

function parsed(text: string) {
  const read = parseRecurrence(text)
  if (!read.ok) throw new Error(read.sentence)
  return read.rule
}

function millisecondsOf(work: () => unknown): number {
  const began = performance.now()
  for (let time = 0; time < TIMES; time += 1) work()
  return (performance.now() - began) / TIMES
}
