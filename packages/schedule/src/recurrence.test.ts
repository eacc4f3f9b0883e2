import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { parseRecurrence } from './parse-recurrence'
import { expandLocal, formatRecurrence, type Recurrence } from './recurrence'

function ruleOf(text: string): Recurrence {
  const parsed = parseRecurrence(text)
  if (!parsed.ok) throw new Error(parsed.sentence)
  return parsed.rule
}

function daysOf(text: string, startsOnLocal: string): string[] {
  const dates = expandLocal({ rule: ruleOf(text), startsOnLocal, startsAtLocal: '09:00' })
  expect(dates.every((date) => date.endsWith('T09:00'))).toBe(true)
  return dates.map((date) => date.slice(0, 10))
}

describe('expandLocal', () => {
  // RFC 5545 §3.8.5.3 [S], run also in dateutil.
  it.each([
    [
      'FREQ=WEEKLY;INTERVAL=2;COUNT=4;BYDAY=TU,SU;WKST=MO',
      '1997-08-05',
      ['1997-08-05', '1997-08-10', '1997-08-19', '1997-08-24'],
    ],
    [
      'FREQ=WEEKLY;INTERVAL=2;COUNT=4;BYDAY=TU,SU;WKST=SU',
      '1997-08-05',
      ['1997-08-05', '1997-08-17', '1997-08-19', '1997-08-31'],
    ],
    [
      'FREQ=MONTHLY;BYMONTHDAY=15,30;COUNT=5',
      '2007-01-15',
      ['2007-01-15', '2007-01-30', '2007-02-15', '2007-03-15', '2007-03-30'],
    ],
    [
      // The source's rule has no end; its first seven dates are compared.
      'FREQ=MONTHLY;BYDAY=MO,TU,WE,TH,FR;BYSETPOS=-2;COUNT=7',
      '1997-09-29',
      [
        ...['1997-09-29', '1997-10-30', '1997-11-27', '1997-12-30'],
        ...['1998-01-29', '1998-02-26', '1998-03-30'],
      ],
    ],
    [
      'FREQ=MONTHLY;COUNT=3;BYDAY=TU,WE,TH;BYSETPOS=3',
      '1997-09-04',
      ['1997-09-04', '1997-10-07', '1997-11-06'],
    ],
  ])('expands %s from %s', (text, startsOnLocal, days) => {
    expect(daysOf(text, startsOnLocal)).toEqual(days)
  })

  it('starts on the first day that matches, which need not be the start', () => {
    expect(daysOf('FREQ=WEEKLY;BYDAY=TU;COUNT=2', '2026-04-06')).toEqual([
      '2026-04-07',
      '2026-04-14',
    ])
  })

  it('passes over months without a 31st, and clamps nothing', () => {
    expect(daysOf('FREQ=MONTHLY;BYMONTHDAY=31;COUNT=3', '2026-01-01')).toEqual([
      '2026-01-31',
      '2026-03-31',
      '2026-05-31',
    ])
    expect(daysOf('FREQ=MONTHLY;BYMONTHDAY=-1;COUNT=3', '2028-01-01')).toEqual([
      '2028-01-31',
      '2028-02-29',
      '2028-03-31',
    ])
  })

  it('includes the last day wholly, and a last time to the minute', () => {
    const untilDay = 'FREQ=WEEKLY;BYDAY=TU;UNTIL=20260421'
    expect(daysOf(untilDay, '2026-04-06')).toEqual(['2026-04-07', '2026-04-14', '2026-04-21'])
    expect(daysOf(`${untilDay}T090000`, '2026-04-06').at(-1)).toBe('2026-04-21')
    expect(daysOf(`${untilDay}T085900`, '2026-04-06').at(-1)).toBe('2026-04-14')
  })

  it('leaves days out, and ignores those that are none of its dates', () => {
    const rule = ruleOf('FREQ=WEEKLY;BYDAY=TU;COUNT=3')
    const pattern = { rule, startsOnLocal: '2026-04-06', startsAtLocal: '18:00' }
    expect(expandLocal({ ...pattern, skipDates: ['2026-04-14', '2026-04-15'] })).toEqual([
      '2026-04-07T18:00',
      '2026-04-21T18:00',
    ])
  })

  it('counts places over the whole month, a day once, in order of time', () => {
    const thursdays = 'FREQ=MONTHLY;BYDAY=TH;BYSETPOS=-2,5,2;COUNT=5'
    expect(daysOf(thursdays, '2024-08-19')).toEqual([
      ...['2024-08-22', '2024-08-29', '2024-09-12', '2024-09-19', '2024-10-10'],
    ])
    const both = 'FREQ=MONTHLY;BYDAY=TU;BYSETPOS=1,-1,-5;UNTIL=20260612'
    expect(daysOf(both, '2026-03-10')).toEqual([
      ...['2026-03-31', '2026-04-07', '2026-04-28', '2026-05-05', '2026-05-26', '2026-06-02'],
    ])
  })

  it('takes a day of the month only where it is the weekday asked for', () => {
    const thirteenth = 'FREQ=MONTHLY;BYMONTHDAY=13;BYDAY=FR;COUNT=3'
    expect(daysOf(thirteenth, '2026-01-01')).toEqual(['2026-02-13', '2026-03-13', '2026-11-13'])
    const lastMonday = 'FREQ=MONTHLY;BYMONTHDAY=25,31;BYDAY=-1MO;COUNT=3'
    expect(daysOf(lastMonday, '2026-01-01')).toEqual(['2026-05-25', '2026-08-31', '2027-01-25'])
    const thirdMonday = 'FREQ=MONTHLY;BYMONTHDAY=15,22;BYDAY=3MO;COUNT=2'
    expect(daysOf(thirdMonday, '2026-01-01')).toEqual(['2026-06-15', '2027-02-15'])
  })

  it('gives nothing for what never comes, without seeking for ever', () => {
    expect(daysOf('FREQ=MONTHLY;BYMONTHDAY=31;BYDAY=1MO;COUNT=3', '2026-01-01')).toEqual([])
    expect(daysOf('FREQ=DAILY;INTERVAL=7;BYDAY=WE;COUNT=3', '2026-01-01')).toEqual([])
  })

  it('refuses days and times that do not exist, and more than 400 dates', () => {
    const rule = ruleOf('FREQ=DAILY;UNTIL=20280101')
    const pattern = { rule, startsOnLocal: '2026-04-06', startsAtLocal: '18:00' }
    expect(() => expandLocal(pattern)).toThrow('400')
    for (const wrong of [
      { startsOnLocal: '2026-02-30' },
      { startsOnLocal: '2026-4-6' },
      { startsAtLocal: '24:00' },
      { startsAtLocal: '18:00:00' },
      { startsAtLocal: '' },
    ]) {
      expect(() => expandLocal({ ...pattern, ...wrong })).toThrow(RangeError)
    }
  })
})

describe('formatRecurrence', () => {
  it('writes one text for one rule, whatever the order it came in', () => {
    const texts = [
      'WKST=MO;BYDAY=TU;COUNT=8;FREQ=WEEKLY;INTERVAL=1',
      'rrule:freq=weekly;byday=tu;count=8',
    ]
    for (const text of texts) {
      expect(formatRecurrence(ruleOf(text))).toBe('FREQ=WEEKLY;COUNT=8;BYDAY=TU')
    }
    expect(formatRecurrence(ruleOf('FREQ=DAILY;UNTIL=20261020T180000'))).toBe(
      'FREQ=DAILY;UNTIL=20261020T180000',
    )
  })

  it('is read back as the rule it was', () => {
    const weekday = fc.constantFrom('MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU')
    const days = fc.uniqueArray(weekday, { minLength: 1 }).map((list) => `;BYDAY=${list}`)
    const monthDays = fc
      .uniqueArray(fc.integer({ min: -31, max: 31 }).filter(Boolean), { minLength: 1 })
      .map((list) => `;BYMONTHDAY=${list}`)
    const nth = fc
      .uniqueArray(fc.tuple(fc.constantFrom(-2, -1, 1, 2, 5), weekday), {
        minLength: 1,
        selector: (pair) => pair.join(''),
      })
      .map((list) => `;BYDAY=${list.map((pair) => pair.join(''))}`)
    const end = fc.constantFrom(';COUNT=12', ';UNTIL=20270131', ';UNTIL=20270131T173000')
    const text = fc
      .tuple(
        fc.oneof(
          days.map((byDay) => `FREQ=WEEKLY${byDay}`),
          days.map((byDay) => `FREQ=DAILY${byDay}`),
          days.map((byDay) => `FREQ=MONTHLY${byDay};BYSETPOS=-1,1`),
          monthDays.map((byMonthDay) => `FREQ=MONTHLY${byMonthDay}`),
          nth.map((byDay) => `FREQ=MONTHLY${byDay}`),
        ),
        end,
        fc.constantFrom('', ';INTERVAL=2', ';WKST=SU'),
      )
      .map((parts) => parts.join(''))
    fc.assert(
      fc.property(text, (written) => {
        const rule = ruleOf(written)
        expect(ruleOf(formatRecurrence(rule))).toEqual(rule)
      }),
    )
  })
})
