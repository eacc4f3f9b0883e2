import { describe, expect, it } from 'vitest'
import { NO_FILTER, dayOf, filterClinics, filterOf, queryOf, type Filter } from './filter'
import type { PageClinic } from './queries'

/** A clinic by its ages; the filter looks at nothing else unless it is asked to. */
const clinic = (ageMin: number | null, ageMax: number | null) =>
  ({ ageMin, ageMax, handicapMin: null, handicapMax: null }) as PageClinic

const isShown = (ages: Filter['ages'], one: PageClinic) =>
  filterClinics([one], { ...NO_FILTER, ages }).length === 1

describe('the filter of ages', () => {
  it.each([
    ['any age', clinic(null, null), { juniors: true, adults: true }],
    ['7 and up', clinic(7, null), { juniors: true, adults: true }],
    ['7 to 10', clinic(7, 10), { juniors: true, adults: false }],
    ['17 and under', clinic(null, 17), { juniors: true, adults: false }],
    ['18 and under', clinic(null, 18), { juniors: true, adults: true }],
    ['17 and up', clinic(17, null), { juniors: true, adults: true }],
    ['18 and up', clinic(18, null), { juniors: false, adults: true }],
  ])('shows what one of that age may take: %s', (_name, one, shown) => {
    expect(isShown('juniors', one)).toBe(shown.juniors)
    expect(isShown('adults', one)).toBe(shown.adults)
    expect(isShown('', one)).toBe(true)
  })
})

describe('the filter in the address', () => {
  it('comes back as it was', () => {
    const filter: Filter = {
      ages: 'juniors',
      level: '',
      day: '0',
      coach: 'Fintan Ash',
      full: 'hide',
    }
    expect(filterOf(new URLSearchParams(queryOf(filter)))).toEqual(filter)
    expect(queryOf(NO_FILTER)).toEqual({})
    expect(filterOf(new URLSearchParams())).toEqual(NO_FILTER)
  })

  it('has no words that the sentence does not have', () => {
    const query = new URLSearchParams('ages=babies&level=&day=7&full=yes&from=mail')
    expect(filterOf(query)).toEqual(NO_FILTER)
  })
})

describe('the filter of days', () => {
  it('goes by the venue’s own clock, with Sunday as 0', () => {
    const startsAt = '2026-09-20T23:30:00Z'
    expect(dayOf({ startsAt, zone: 'America/Denver' })).toBe('0')
    expect(dayOf({ startsAt, zone: 'Europe/Dublin' })).toBe('1')
  })
})
