import { describe, expect, it } from 'vitest'
import { localDayOf, localTimeOf, mondayOf, shiftDay, weekdayOf } from './local-day'

describe('a local day', () => {
  it.each([
    ['Europe/Dublin', '2026-09-17', '00:30'],
    ['America/Denver', '2026-09-16', '17:30'],
    ['Pacific/Auckland', '2026-09-17', '11:30'],
  ])('in %s is %s, and the time %s', (zone, day, time) => {
    const at = '2026-09-16T23:30:00Z'
    expect(localDayOf(at, zone)).toBe(day)
    expect(localTimeOf(at, zone)).toBe(time)
  })

  it('begins at midnight and not a moment before', () => {
    const midnight = Date.parse('2026-10-25T23:00:00Z')
    expect(localDayOf(midnight + 3_600_000 - 1, 'Europe/Dublin')).toBe('2026-10-25')
    expect(localDayOf(midnight + 3_600_000, 'Europe/Dublin')).toBe('2026-10-26')
    expect(localTimeOf(midnight + 3_600_000, 'Europe/Dublin')).toBe('00:00')
  })

  it('moves over the ends of months and years, and over a change of clocks', () => {
    expect(shiftDay('2026-12-31', 1)).toBe('2027-01-01')
    expect(shiftDay('2028-03-01', -1)).toBe('2028-02-29')
    expect(shiftDay('2026-10-24', 7)).toBe('2026-10-31')
  })

  it('knows its weekday and the Monday of its week', () => {
    expect(weekdayOf('2026-09-14')).toBe(0)
    expect(weekdayOf('2026-09-20')).toBe(6)
    expect(mondayOf('2026-09-14')).toBe('2026-09-14')
    expect(mondayOf('2026-09-20')).toBe('2026-09-14')
  })
})
