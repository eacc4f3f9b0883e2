import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import {
  formatDay,
  formatDuration,
  formatLocalDay,
  formatLocalTime,
  formatSessionCount,
  formatSessionTime,
  formatTime,
  formatTimeRange,
  formatZoneIfElsewhere,
  type DayStyle,
} from './format'

const DUBLIN = 'Europe/Dublin'
const DENVER = 'America/Denver'

describe('formatSessionTime', () => {
  it.each([
    ['en-IE', DUBLIN, '2026-09-17T17:00Z', '2026-09-17T18:15Z', 'Thu 17 Sep, 18:00–19:15'],
    ['en-GB', DUBLIN, '2026-09-17T17:00Z', '2026-09-17T18:15Z', 'Thu 17 Sep, 18:00–19:15'],
    ['en-US', DENVER, '2026-09-18T00:00Z', '2026-09-18T01:15Z', 'Thu, Sep 17, 6:00–7:15 pm'],
    ['en-AU', DUBLIN, '2026-09-17T17:00Z', '2026-09-17T18:15Z', 'Thu 17 Sep, 6:00–7:15 pm'],
    ['de-DE', DUBLIN, '2026-09-17T17:00Z', '2026-09-17T18:15Z', 'Thu 17 Sep, 18:00–19:15'],
    ['en-US', DENVER, '2026-09-17T17:30Z', '2026-09-17T18:45Z', 'Thu, Sep 17, 11:30 am–12:45 pm'],
    ['en-US', DENVER, '2026-09-17T18:00Z', '2026-09-17T19:00Z', 'Thu, Sep 17, 12:00–1:00 pm'],
    [
      'en-IE',
      DUBLIN,
      '2026-09-17T22:00Z',
      '2026-09-17T23:15Z',
      'Thu 17 Sep, 23:00–Fri 18 Sep, 00:15',
    ],
    [
      'en-US',
      DENVER,
      '2026-09-18T05:00Z',
      '2026-09-18T06:15Z',
      'Thu, Sep 17, 11:00 pm–Fri, Sep 18, 12:15 am',
    ],
    ['en-IE', DUBLIN, '2026-10-25T00:30Z', '2026-10-25T01:45Z', 'Sun 25 Oct, 01:30–01:45'],
  ])('in %s, %s, from %s to %s', (locale, zone, startsAt, endsAt, text) => {
    expect(formatSessionTime({ startsAt, endsAt, zone, locale })).toBe(text)
    const [from, to] = [new Date(startsAt), new Date(endsAt)]
    expect(formatSessionTime({ startsAt: from, endsAt: to, zone, locale })).toBe(text)
  })
})

describe('parts of it', () => {
  const at = '2026-09-17T17:00:00Z'

  it('writes a time, and a range of times', () => {
    expect(formatTime({ at, zone: DUBLIN, locale: 'en-IE' })).toBe('18:00')
    expect(formatTime({ at, zone: DUBLIN, locale: 'en-US' })).toBe('6:00 pm')
    expect(formatLocalTime({ timeLocal: '09:05', locale: 'en-IE' })).toBe('09:05')
    expect(formatLocalTime({ timeLocal: '00:05', locale: 'en-US' })).toBe('12:05 am')
    const span = { startsAt: at, endsAt: '2026-09-17T18:15:00Z', zone: DUBLIN }
    expect(formatTimeRange({ ...span, locale: 'en-IE' })).toBe('18:00–19:15')
    expect(formatTimeRange({ ...span, locale: 'en-US' })).toBe('6:00–7:15 pm')
    const night = { ...span, endsAt: '2026-09-18T17:00:00Z', locale: 'en-US' }
    expect(formatTimeRange(night)).toBe('6:00 pm–6:00 pm')
  })

  it.each<[DayStyle, string, string]>([
    ['weekday', 'Thu 17 Sep', 'Thu, Sep 17'],
    ['short', '17 Sep', 'Sep 17'],
    ['long', '17 September', 'September 17'],
    ['weekday-long', 'Thursday 17 September', 'Thursday, September 17'],
    ['year', '17 September 2026', 'September 17, 2026'],
    ['full', 'Thursday 17 September 2026', 'Thursday, September 17, 2026'],
  ])('writes a day as %s', (style, ireland, unitedStates) => {
    const dayLocal = '2026-09-17'
    expect(formatLocalDay({ dayLocal, style, locale: 'en-IE' })).toBe(ireland)
    expect(formatLocalDay({ dayLocal, style, locale: 'en-US' })).toBe(unitedStates)
    expect(formatDay({ at, style, zone: DUBLIN, locale: 'en-IE' })).toBe(ireland)
  })

  it('shortens every month and weekday to three letters', () => {
    for (let month = 1; month <= 12; month += 1) {
      const dayLocal = `2026-${String(month).padStart(2, '0')}-0${(month % 7) + 1}`
      expect(formatLocalDay({ dayLocal, locale: 'en-GB' })).toMatch(/^[A-Z]..\s\d\s[A-Z]..$/)
    }
  })

  it('writes the day the venue has, not the reader', () => {
    const late = '2026-09-18T05:30:00Z'
    expect(formatDay({ at: late, zone: DENVER, locale: 'en-IE' })).toBe('Thu 17 Sep')
    expect(formatDay({ at: late, zone: DUBLIN, locale: 'en-IE' })).toBe('Fri 18 Sep')
  })

  it('refuses days that are none', () => {
    expect(() => formatLocalDay({ dayLocal: 'soon', locale: 'en-IE' })).toThrow(RangeError)
  })

  it.each([
    [75, '1 hour 15 minutes'],
    [60, '1 hour'],
    [120, '2 hours'],
    [45, '45 minutes'],
    [61, '1 hour 1 minute'],
    [0, '0 minutes'],
  ])('writes %i minutes in words', (minutes, words) => {
    expect(formatDuration(minutes)).toBe(words)
  })

  it('counts weekdays where they are all one, else sessions', () => {
    expect(formatSessionCount(['2026-09-19', '2026-09-26'])).toBe('2 Saturdays')
    expect(formatSessionCount(['2026-09-19'])).toBe('1 Saturday')
    expect(formatSessionCount(['2026-09-19', '2026-09-27'])).toBe('2 sessions')
    expect(formatSessionCount(['2026-09-19', '2026-09-19'])).toBe('2 sessions')
    expect(formatSessionCount([])).toBe('0 sessions')
  })

  it('names the zone only to a reader whose clock differs', () => {
    const elsewhere = (readerZone: string) =>
      formatZoneIfElsewhere({ at, zone: DUBLIN, readerZone })
    expect(elsewhere('Europe/London')).toBeNull()
    expect(elsewhere('America/Denver')).toBe('Dublin time')
    const newYork = { at, zone: 'America/New_York', readerZone: DUBLIN }
    expect(formatZoneIfElsewhere(newYork)).toBe('New York time')
  })

  it('is light: it imports nothing', () => {
    const source = readFileSync(new URL('./format.ts', import.meta.url), 'utf8')
    expect(source).not.toMatch(/^\s*import\b|\bimport\(|\bfrom '/m)
  })
})
