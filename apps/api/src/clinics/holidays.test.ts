import Holidays from 'date-holidays'
import { describe, expect, it } from 'vitest'
import { COUNTRY_OF_SHARED_ZONE, listHolidays } from './holidays'

const SPRING = { from: new Date('2031-03-01T12:00:00Z'), to: new Date('2031-05-31T12:00:00Z') }

const namesIn = async (zone: string) =>
  (await listHolidays({ zone, ...SPRING })).map(({ dayLocal, name }) => `${dayLocal} ${name}`)

describe('holidays', () => {
  it.each([
    { zone: 'Europe/Dublin', has: '2031-03-17 St. Patrick’s Day' },
    { zone: 'Europe/Madrid', has: '2031-04-11 Viernes Santo' },
    { zone: 'Asia/Tokyo', has: '2031-05-05 こどもの日' },
    { zone: 'America/Denver', has: '2031-05-26 Memorial Day' },
    { zone: 'Europe/Rome', has: '2031-05-01 Festa del lavoro' },
  ])('are those of the country of $zone', async ({ zone, has }) => {
    expect(await namesIn(zone)).toContain(has)
  })

  it('are none where the country is not known', async () => {
    expect(await namesIn('Etc/UTC')).toEqual([])
  })

  it('begin and end with the days of the span where it is', async () => {
    // The first minute of New Year there is the last morning of the old year here.
    const from = new Date('2030-12-31T15:00:00Z')
    const span = { zone: 'Asia/Tokyo', from, to: from }
    expect(await listHolidays(span)).toMatchObject([{ dayLocal: '2031-01-01' }])
    const before = new Date(from.getTime() - 1)
    expect(await listHolidays({ ...span, from: before, to: before })).toEqual([])
  })

  it('know one country for every zone that several keep', () => {
    const keepers = new Map<string, string[]>()
    for (const code of Object.keys(new Holidays().getCountries())) {
      for (const zone of new Holidays(code).getTimezones()) {
        keepers.set(zone, [...(keepers.get(zone) ?? []), code])
      }
    }
    const shared = [...keepers].filter(([, codes]) => codes.length > 1)
    expect(shared.length).toBeGreaterThan(10)
    for (const [zone] of shared) {
      expect(COUNTRY_OF_SHARED_ZONE, zone).toHaveProperty([zone])
    }
  })
})
