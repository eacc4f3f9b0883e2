import * as rrule from 'rrule'
import { describe, expect, it } from 'vitest'
import { expandInstants, parseRecurrence } from '@marram/schedule'

const { RRule } = rrule
const TEXTS = [
  'FREQ=WEEKLY;BYDAY=TU;COUNT=8',
  'FREQ=WEEKLY;BYDAY=TU,TH;COUNT=40',
  'FREQ=WEEKLY;INTERVAL=2;BYDAY=TU,SU;COUNT=20',
  'FREQ=MONTHLY;BYMONTHDAY=15;COUNT=12',
  'FREQ=DAILY;COUNT=60',
]
const ZONES = ['Europe/Dublin', 'America/Denver', 'Australia/Sydney', 'America/Phoenix']

/** The fastest of many rounds, in milliseconds: what is slower was something else's doing. */
function cost(work: () => unknown): number {
  const rounds = Array.from({ length: 40 }, () => {
    const startedAt = performance.now()
    for (let time = 0; time < 20; time += 1) work()
    return performance.now() - startedAt
  })
  return Math.min(...rounds)
}

describe('expansion into instants', () => {
  it('costs at most twice what rrule takes for the local dates alone', { timeout: 60_000 }, () => {
    const parsed = TEXTS.map((text) => {
      const read = parseRecurrence(text)
      if (!read.ok) throw new Error(read.sentence)
      return read.rule
    })
    const options = TEXTS.map((text) => ({
      ...RRule.parseString(text),
      dtstart: new Date(Date.UTC(2026, 3, 6, 18)),
    }))
    const alone = cost(() => options.map((option) => new RRule(option, true).all()))
    for (const zone of ZONES) {
      const whole = cost(() =>
        parsed.map((rule) =>
          expandInstants({
            rule,
            startsOnLocal: '2026-04-06',
            startsAtLocal: '18:00',
            durationMinutes: 75,
            zone,
          }),
        ),
      )
      expect(whole / alone, zone).toBeLessThanOrEqual(2)
    }
  })
})
