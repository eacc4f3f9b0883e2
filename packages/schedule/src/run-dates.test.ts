import { describe, expect, it } from 'vitest'
import { parseRecurrence } from './parse-recurrence'
import { datesOfRun, expandInstants, planRun, type RunPattern } from './run-dates'

const TUESDAYS = {
  startsOnLocal: '2026-10-06',
  startsAtLocal: '17:15',
  durationMinutes: 75,
  zone: 'Europe/Dublin',
}

function patternOf(text: string, changes: Partial<RunPattern> = {}): RunPattern {
  const parsed = parseRecurrence(text)
  if (!parsed.ok) throw new Error(parsed.sentence)
  return { ...TUESDAYS, rule: parsed.rule, ...changes }
}

describe('expandInstants', () => {
  it('keeps the wall clock and the length when the clocks go back', () => {
    const dates = expandInstants(patternOf('FREQ=WEEKLY;BYDAY=TU;COUNT=4'))
    expect(dates.map(({ startsAt }) => startsAt.toISOString().slice(0, 16))).toEqual([
      '2026-10-06T16:15',
      '2026-10-13T16:15',
      '2026-10-20T16:15',
      '2026-10-27T17:15',
    ])
    for (const { startsAt, endsAt } of dates) expect(+endsAt - +startsAt).toBe(75 * 60_000)
  })

  it('lets a session that spans the change last as long as ever', () => {
    const [night] = expandInstants(
      patternOf('FREQ=DAILY;COUNT=1', { startsOnLocal: '2026-10-25', startsAtLocal: '00:30' }),
    )
    expect(night?.startsAt.toISOString()).toBe('2026-10-24T23:30:00.000Z')
    expect(night?.endsAt.toISOString()).toBe('2026-10-25T00:45:00.000Z')
  })

  it('counts a day left out towards COUNT, as RFC 5545 does, and numbers what is held', () => {
    const pattern = patternOf('FREQ=WEEKLY;BYDAY=TU;COUNT=6', { skipDates: ['2026-10-13'] })
    const dates = expandInstants(pattern)
    expect(dates.map(({ number, startsOnLocal }) => [number, startsOnLocal])).toEqual([
      [1, '2026-10-06'],
      [2, '2026-10-20'],
      [3, '2026-10-27'],
      [4, '2026-11-03'],
      [5, '2026-11-10'],
    ])
  })

  it('leaves out by the local day, wherever the instant falls', () => {
    const dates = expandInstants(
      patternOf('FREQ=DAILY;COUNT=2', {
        zone: 'America/Denver',
        startsAtLocal: '20:00',
        skipDates: ['2026-10-06'],
      }),
    )
    expect(dates.map(({ startsAt }) => startsAt.toISOString().slice(0, 10))).toEqual(['2026-10-08'])
  })
})

describe('datesOfRun', () => {
  it('still holds six sessions where a day is left out', () => {
    const pattern = patternOf('FREQ=WEEKLY;BYDAY=TU;COUNT=6', { skipDates: ['2026-10-27'] })
    expect(datesOfRun(pattern).map(({ startsOnLocal }) => startsOnLocal)).toEqual([
      ...['2026-10-06', '2026-10-13', '2026-10-20'],
      ...['2026-11-03', '2026-11-10', '2026-11-17'],
    ])
  })

  it('does not run on for days left out that are none of its dates, or come after it', () => {
    const skipDates = ['2026-10-07', '2026-11-17', '2026-11-24']
    const dates = datesOfRun(patternOf('FREQ=WEEKLY;BYDAY=TU;COUNT=6', { skipDates }))
    expect(dates.at(-1)).toMatchObject({ number: 6, startsOnLocal: '2026-11-10' })
  })

  it('runs on past a day left out after the old end', () => {
    const skipDates = ['2026-10-27', '2026-11-17']
    const dates = datesOfRun(patternOf('FREQ=WEEKLY;BYDAY=TU;COUNT=6', { skipDates }))
    expect(dates.at(-1)).toMatchObject({ number: 6, startsOnLocal: '2026-11-24' })
  })

  it('ends on the last day of a run until a day', () => {
    const pattern = patternOf('FREQ=WEEKLY;BYDAY=TU;UNTIL=20261103', { skipDates: ['2026-10-27'] })
    expect(datesOfRun(pattern).map(({ startsOnLocal }) => startsOnLocal)).toEqual([
      ...['2026-10-06', '2026-10-13', '2026-10-20', '2026-11-03'],
    ])
  })

  it('holds the most sessions a run may have, days left out besides', () => {
    const pattern = patternOf('FREQ=DAILY;COUNT=400', { skipDates: ['2026-10-07', '2026-10-08'] })
    expect(datesOfRun(pattern).length).toBe(400)
  })
})

describe('planRun', () => {
  it('says the rule and gives its dates', () => {
    const planned = planRun({ ...TUESDAYS, rruleText: 'FREQ=WEEKLY;COUNT=6' })
    expect(planned).toMatchObject({ ok: true, description: 'Every Tuesday' })
    expect(planned.ok && planned.dates.length).toBe(6)
  })

  it.each([
    ['FREQ=WEEKLY;COUNT=-2', 'bad-value'],
    ['FREQ=DAILY;UNTIL=20300101', 'too-many'],
    ['FREQ=DAILY;UNTIL=20261005', 'no-dates'],
    ['FREQ=MONTHLY;BYMONTHDAY=31;BYDAY=1MO;COUNT=3', 'no-dates'],
    ['FREQ=MONTHLY;INTERVAL=50;COUNT=30', 'too-few-dates'],
  ])('refuses %s as %s, in a sentence', (rruleText, reason) => {
    const planned = planRun({ ...TUESDAYS, rruleText })
    expect(planned).toMatchObject({ ok: false, reason })
    expect(planned.ok ? '' : planned.sentence).toMatch(/^[A-Z].*\.$/)
  })

  it('takes 400 dates until a day and not one more', () => {
    const pattern = { ...TUESDAYS, startsOnLocal: '2026-01-01' }
    const until = (day: string) => planRun({ ...pattern, rruleText: `FREQ=DAILY;UNTIL=${day}` })
    expect(until('20270204')).toMatchObject({ ok: true })
    expect(until('20270205')).toMatchObject({ ok: false, reason: 'too-many' })
  })
})
