import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { parseRecurrence, type RecurrenceRefusal } from './parse-recurrence'

describe('parseRecurrence', () => {
  it('reads the parts of a rule', () => {
    expect(parseRecurrence('FREQ=MONTHLY;INTERVAL=2;BYDAY=MO,TU;BYSETPOS=-2;COUNT=6')).toEqual({
      ok: true,
      rule: {
        freq: 'monthly',
        interval: 2,
        byDay: [
          { weekday: 'MO', nth: null },
          { weekday: 'TU', nth: null },
        ],
        bySetPos: [-2],
        byMonthDay: [],
        weekStart: 'MO',
        ends: { kind: 'count', count: 6 },
      },
    })
  })

  it('reads numbered weekdays of a month', () => {
    const read = parseRecurrence('FREQ=MONTHLY;BYDAY=+2TU,-1FR;COUNT=6')
    expect(read.ok && read.rule.byDay).toEqual([
      { weekday: 'TU', nth: 2 },
      { weekday: 'FR', nth: -1 },
    ])
  })

  it.each<[string, RecurrenceRefusal]>([
    ['', 'not-a-rule'],
    ['every Tuesday', 'not-a-rule'],
    ['FREQ=WEEKLY;', 'not-a-rule'],
    ['FREQ=WEEKLY;COUNT=', 'not-a-rule'],
    ['DTSTART:20260406T180000\nRRULE:FREQ=WEEKLY;COUNT=2', 'not-a-rule'],
    ['FREQ=WEEKLY;COUNT=3;BYHOUR=2', 'unknown-part'],
    ['FREQ=WEEKLY;COUNT=3;X-MOON=1', 'unknown-part'],
    ['FREQ=WEEKLY;COUNT=3;COUNT=4', 'repeated-part'],
    ['FREQ=WEEKLY;COUNT=3;BYDAY=TU,TU', 'repeated-part'],
    ['FREQ=MONTHLY;COUNT=3;BYMONTHDAY=1,1', 'repeated-part'],
    ['COUNT=3', 'bad-value'],
    ['FREQ=YEARLY;COUNT=3', 'bad-value'],
    ['FREQ=SECONDLY;COUNT=3', 'bad-value'],
    ['FREQ=WEEKLY;COUNT=-2', 'bad-value'],
    ['FREQ=WEEKLY;COUNT=0', 'bad-value'],
    ['FREQ=WEEKLY;COUNT=1.5', 'bad-value'],
    ['FREQ=WEEKLY;COUNT=1E3', 'bad-value'],
    ['FREQ=WEEKLY;INTERVAL=0;COUNT=3', 'bad-value'],
    ['FREQ=WEEKLY;INTERVAL=-1;COUNT=3', 'bad-value'],
    ['FREQ=WEEKLY;INTERVAL=53;COUNT=3', 'bad-value'],
    ['FREQ=WEEKLY;BYDAY=XX;COUNT=3', 'bad-value'],
    ['FREQ=MONTHLY;BYDAY=0MO;COUNT=3', 'bad-value'],
    ['FREQ=MONTHLY;BYDAY=6MO;COUNT=3', 'bad-value'],
    ['FREQ=MONTHLY;BYMONTHDAY=0;COUNT=3', 'bad-value'],
    ['FREQ=MONTHLY;BYMONTHDAY=32;COUNT=3', 'bad-value'],
    ['FREQ=MONTHLY;BYDAY=MO;BYSETPOS=32;COUNT=3', 'bad-value'],
    ['FREQ=WEEKLY;WKST=1;COUNT=3', 'bad-value'],
    ['FREQ=WEEKLY;UNTIL=20260230', 'bad-value'],
    ['FREQ=WEEKLY;UNTIL=2026-10-20', 'bad-value'],
    ['FREQ=WEEKLY;UNTIL=20261020T250000', 'bad-value'],
    ['FREQ=WEEKLY;UNTIL=20261020T180099', 'bad-value'],
    ['FREQ=WEEKLY', 'endless'],
    ['FREQ=WEEKLY;COUNT=3;UNTIL=20261020', 'two-ends'],
    ['FREQ=WEEKLY;COUNT=401', 'too-many'],
    ['FREQ=WEEKLY;BYDAY=1TU;COUNT=3', 'parts-disagree'],
    ['FREQ=WEEKLY;BYMONTHDAY=3;COUNT=3', 'parts-disagree'],
    ['FREQ=WEEKLY;BYDAY=TU,TH;BYSETPOS=1;COUNT=3', 'parts-disagree'],
    ['FREQ=MONTHLY;BYSETPOS=1;COUNT=3', 'parts-disagree'],
    ['FREQ=MONTHLY;BYDAY=1TU;BYSETPOS=1;COUNT=3', 'parts-disagree'],
    ['FREQ=MONTHLY;BYDAY=TU,1FR;COUNT=3', 'parts-disagree'],
    ['FREQ=WEEKLY;UNTIL=20261020T170000Z', 'until-needs-zone'],
  ])('refuses %j as %s', (text, reason) => {
    const read = parseRecurrence(text)
    expect(read).toMatchObject({ ok: false, reason })
    expect(read.ok ? '' : read.sentence).toMatch(/^[A-Z].*\.$/)
  })

  it('takes the most sessions a run may have', () => {
    expect(parseRecurrence('FREQ=DAILY;COUNT=400').ok).toBe(true)
  })

  it('turns a last instant into the venue’s own time', () => {
    const read = parseRecurrence('FREQ=WEEKLY;UNTIL=20261020T170000Z', { zone: 'Europe/Dublin' })
    expect(read.ok && read.rule.ends).toEqual({ kind: 'until', untilLocal: '2026-10-20T18:00' })
    const west = parseRecurrence('FREQ=WEEKLY;UNTIL=20261021T003000Z', { zone: 'America/Denver' })
    expect(west.ok && west.rule.ends).toEqual({ kind: 'until', untilLocal: '2026-10-20T18:30' })
  })

  it('answers anything with a rule or a sentence', () => {
    const piece = fc.oneof(
      fc.string(),
      fc.string({ unit: fc.constantFrom(...'FREQ=WEEKLY;COUNT,BYDAY-0123456789T') }),
      fc.constantFrom('FREQ=WEEKLY', 'COUNT=3', 'BYDAY=TU', 'INTERVAL=2', 'UNTIL=20261020'),
    )
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 5 }), (pieces) => {
        const read = parseRecurrence(pieces.join(';'))
        if (!read.ok) expect(read.sentence.length).toBeGreaterThan(10)
      }),
      { numRuns: 300 },
    )
  })
})
