import { describe, expect, it } from 'vitest'
import { hourInShort, hoursOf, spanOf, timeLocalOf } from './board-times'

const zone = 'Europe/Dublin'
const session = (startsAt: string, endsAt: string) => ({ startsAt, endsAt, zone })

describe('a slip on the board', () => {
  it.each([
    ['in the evening', '2026-12-01T18:00Z', '2026-12-01T19:15Z', { from: 1080, to: 1155 }],
    ['to midnight', '2026-12-01T23:00Z', '2026-12-02T00:00Z', { from: 1380, to: 1440 }],
    ['over midnight', '2026-12-01T23:00Z', '2026-12-02T00:30Z', { from: 1380, to: 1440 }],
    ['from midnight', '2026-12-01T00:00Z', '2026-12-01T01:00Z', { from: 0, to: 60 }],
  ])('stands in its own day: %s', (_when, startsAt, endsAt, span) => {
    expect(spanOf(session(startsAt, endsAt))).toEqual(span)
  })

  it('makes the board long enough, and no longer than the day', () => {
    expect(hoursOf({ sessions: [] })).toEqual({ from: 9, to: 21 })
    const early = session('2026-12-01T07:30Z', '2026-12-01T08:30Z')
    const late = session('2026-12-01T21:00Z', '2026-12-01T22:10Z')
    const midnight = session('2026-12-01T23:00Z', '2026-12-02T00:00Z')
    expect(hoursOf({ sessions: [early] })).toEqual({ from: 7, to: 21 })
    expect(hoursOf({ sessions: [late] })).toEqual({ from: 9, to: 24 })
    expect(hoursOf({ sessions: [midnight] })).toEqual({ from: 9, to: 24 })
  })
})

describe('the hours above it', () => {
  it.each([
    ['en-IE', 9, '9'],
    ['en-IE', 18, '18'],
    ['en-US', 9, '9 am'],
    ['en-US', 18, '6 pm'],
    ['en-US', 12, '12 pm'],
  ])('are written in %s as the academy does: %i', (locale, hour, text) => {
    expect(hourInShort(hour, locale)).toBe(text)
  })

  it('come of minutes', () => {
    expect(timeLocalOf(545)).toBe('09:05')
  })
})
