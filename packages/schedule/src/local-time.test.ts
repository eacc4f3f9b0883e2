import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { instantReader, toInstant, toLocal, toLocalMs, transitionsBetween } from './local-time'

function utcOf(startsOnLocal: string, startsAtLocal: string, zone: string): string {
  return toInstant({ startsOnLocal, startsAtLocal, zone }).toISOString().slice(0, 16)
}

describe('toInstant', () => {
  // RFC 5545 §3.3.5 [S]: the offset before a gap; the first of two. Offsets from IANA, by hand [D].
  it.each([
    ['Europe/Dublin', '2026-03-29', '00:59', '2026-03-29T00:59'],
    ['Europe/Dublin', '2026-03-29', '01:00', '2026-03-29T01:00'],
    ['Europe/Dublin', '2026-03-29', '01:30', '2026-03-29T01:30'],
    ['Europe/Dublin', '2026-03-29', '02:00', '2026-03-29T01:00'],
    ['Europe/Dublin', '2026-03-29', '18:00', '2026-03-29T17:00'],
    ['Europe/Dublin', '2026-10-25', '00:59', '2026-10-24T23:59'],
    ['Europe/Dublin', '2026-10-25', '01:00', '2026-10-25T00:00'],
    ['Europe/Dublin', '2026-10-25', '01:30', '2026-10-25T00:30'],
    ['Europe/Dublin', '2026-10-25', '02:00', '2026-10-25T02:00'],
    ['America/Denver', '2026-03-08', '01:59', '2026-03-08T08:59'],
    ['America/Denver', '2026-03-08', '02:30', '2026-03-08T09:30'],
    ['America/Denver', '2026-03-08', '03:00', '2026-03-08T09:00'],
    ['America/Denver', '2026-11-01', '01:30', '2026-11-01T07:30'],
    ['America/Denver', '2026-11-01', '02:00', '2026-11-01T09:00'],
    ['Australia/Sydney', '2026-04-05', '02:30', '2026-04-04T15:30'],
    ['Australia/Sydney', '2026-04-05', '03:00', '2026-04-04T17:00'],
    ['Australia/Sydney', '2026-10-04', '02:30', '2026-10-03T16:30'],
    ['Australia/Sydney', '2026-10-04', '03:00', '2026-10-03T16:00'],
    ['America/Phoenix', '2026-03-08', '02:30', '2026-03-08T09:30'],
    ['America/Phoenix', '2026-11-01', '01:30', '2026-11-01T08:30'],
    ['Pacific/Chatham', '2026-01-01', '12:00', '2025-12-31T22:15'],
  ])('reads in %s %s %s as %sZ', (zone, day, time, utc) => {
    expect(utcOf(day, time, zone)).toBe(utc)
  })

  it('refuses days, times and zones that do not exist', () => {
    expect(() => utcOf('2026-02-29', '12:00', 'Europe/Dublin')).toThrow(RangeError)
    expect(() => utcOf('2026-02-28', '25:00', 'Europe/Dublin')).toThrow(RangeError)
    expect(() => utcOf('2026-02-28', '12:00', 'Europe/Atlantis')).toThrow(RangeError)
  })
})

describe('transitionsBetween', () => {
  const years = { from: new Date('2026-01-01T00:00:00Z'), to: new Date('2028-01-01T00:00:00Z') }

  // IANA transitions.
  it.each([
    [
      'Europe/London',
      ['forward 2026-03-29', 'back 2026-10-25', 'forward 2027-03-28', 'back 2027-10-31'],
    ],
    [
      'Europe/Dublin',
      ['forward 2026-03-29', 'back 2026-10-25', 'forward 2027-03-28', 'back 2027-10-31'],
    ],
    [
      'America/Denver',
      ['forward 2026-03-08', 'back 2026-11-01', 'forward 2027-03-14', 'back 2027-11-07'],
    ],
    [
      'Australia/Sydney',
      ['back 2026-04-05', 'forward 2026-10-04', 'back 2027-04-04', 'forward 2027-10-03'],
    ],
    ['America/Phoenix', []],
  ])('lists those of %s', (zone, changes) => {
    const found = transitionsBetween({ zone, ...years })
    expect(found.map(({ direction, dayLocal }) => `${direction} ${dayLocal}`)).toEqual(changes)
  })

  it('has Dublin’s at 01:00 UTC, an hour forward and back', () => {
    const [spring, autumn] = transitionsBetween({ zone: 'Europe/Dublin', ...years })
    expect(spring).toMatchObject({ offsetBeforeMinutes: 0, offsetAfterMinutes: 60 })
    expect(spring?.at.toISOString()).toBe('2026-03-29T01:00:00.000Z')
    expect(autumn).toMatchObject({ offsetBeforeMinutes: 60, offsetAfterMinutes: 0 })
    expect(autumn?.at.toISOString()).toBe('2026-10-25T01:00:00.000Z')
  })

  it('includes one at the start of the span and not one at its end', () => {
    const at = new Date('2026-03-29T01:00:00Z')
    const zone = 'Europe/Dublin'
    const count = (from: number, to: number) =>
      transitionsBetween({ zone, from: new Date(+at + from), to: new Date(+at + to) }).length
    expect([count(0, 1), count(1, 2), count(-1, 0), count(-1, 1)]).toEqual([1, 0, 0, 1])
  })
})

describe('toLocal', () => {
  it('shows what the clocks of the zone show', () => {
    const at = new Date('2026-10-25T00:30:00Z')
    expect(toLocal({ at, zone: 'Europe/Dublin' })).toEqual({
      dayLocal: '2026-10-25',
      timeLocal: '01:30',
    })
    expect(toLocal({ at, zone: 'America/Denver' })).toEqual({
      dayLocal: '2026-10-24',
      timeLocal: '18:30',
    })
  })
})

describe('instantReader', () => {
  const zones = ['Europe/Dublin', 'America/Denver', 'Australia/Sydney', 'America/Phoenix']
  const more = ['Australia/Lord_Howe', 'Pacific/Chatham', 'Asia/Kathmandu', 'Pacific/Kiritimati']

  it('answers as toInstant for every half hour around every change of clocks', () => {
    for (const zone of [...zones, ...more]) {
      const span = { from: new Date('2025-12-01T00:00:00Z'), to: new Date('2028-02-01T00:00:00Z') }
      for (const { dayLocal } of transitionsBetween({ zone, ...span })) {
        const startMs = toLocalMs(dayLocal, '00:00') - 86_400_000
        const read = instantReader({ zone, fromLocalMs: startMs, toLocalMs: startMs })
        for (let minutes = 0; minutes < 3 * 1440; minutes += 15) {
          const localMs = startMs + minutes * 60_000
          const [day = '', time = ''] = new Date(localMs).toISOString().slice(0, 16).split('T')
          const at = toInstant({ startsOnLocal: day, startsAtLocal: time, zone })
          expect(new Date(read(localMs)), `${zone} ${day} ${time}`).toEqual(at)
        }
      }
    }
  })

  it('answers as toInstant at any minute of any year', () => {
    const minute = fc.integer({ min: 0, max: 60 * 366 * 1440 })
    fc.assert(
      fc.property(minute, fc.constantFrom(...zones, ...more), (minutes, zone) => {
        const localMs = Date.UTC(1995, 0, 1) + minutes * 60_000
        const read = instantReader({ zone, fromLocalMs: localMs, toLocalMs: localMs })
        const [day = '', time = ''] = new Date(localMs).toISOString().slice(0, 16).split('T')
        expect(new Date(read(localMs))).toEqual(
          toInstant({ startsOnLocal: day, startsAtLocal: time, zone }),
        )
      }),
    )
  })
})
