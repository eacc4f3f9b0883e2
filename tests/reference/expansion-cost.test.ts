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

/**
 * What two works cost, as a ratio: rounds in turn, so that both meet the same machine, and of each
 * the fastest, since what is slower was something else's doing.
 */
function costRatio(work: () => unknown, base: () => unknown): number {
  let [workMs, baseMs] = [Infinity, Infinity]
  for (let round = 0; round < 100; round += 1) {
    baseMs = Math.min(baseMs, timeOf(base))
    workMs = Math.min(workMs, timeOf(work))
  }
  return workMs / baseMs
}

function timeOf(work: () => unknown): number {
  const startedAt = performance.now()
  for (let time = 0; time < 5; time += 1) work()
  return performance.now() - startedAt
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
    const alone = () => options.map((option) => new RRule(option, true).all())
    for (const zone of ZONES) {
      const whole = () =>
        parsed.map((rule) =>
          expandInstants({
            rule,
            startsOnLocal: '2026-04-06',
            startsAtLocal: '18:00',
            durationMinutes: 75,
            zone,
          }),
        )
      expect(costRatio(whole, alone), zone).toBeLessThanOrEqual(2)
    }
  })
})
