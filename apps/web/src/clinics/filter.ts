import { localDayOf, weekdayOf } from '../academies/local-day'
import type { PageClinic } from './queries'

/** The words of the filter's sentence; an empty word leaves everything in. */
export interface Filter {
  ages: '' | 'juniors' | 'adults'
  level: '' | 'beginner' | 'middle' | 'low'
  /** 0 is Sunday; empty for any day. */
  day: string
  coach: string
  full: '' | 'hide'
}

export const NO_FILTER: Filter = { ages: '', level: '', day: '', coach: '', full: '' }

/** The filter that an address carries; a word that the sentence does not have is left out. */
export function filterOf(query: URLSearchParams): Filter {
  const wordOf = <Word extends string>(name: keyof Filter, words: readonly Word[]) =>
    words.find((word) => word === query.get(name)) ?? ''
  return {
    ages: wordOf('ages', ['juniors', 'adults']),
    level: wordOf('level', ['beginner', 'middle', 'low']),
    day: wordOf('day', ['0', '1', '2', '3', '4', '5', '6']),
    coach: query.get('coach') ?? '',
    full: wordOf('full', ['hide']),
  }
}

/** The query of an address that carries the filter: only the words that leave something out. */
export function queryOf(filter: Filter): Record<string, string> {
  return Object.fromEntries(Object.entries(filter).filter(([, word]) => word !== ''))
}

/** A handicap in the middle of each level's range. */
const LEVELS = { beginner: 36, middle: 18, low: 6 } as const
const ADULT_YEARS = 18

export function filterClinics(clinics: readonly PageClinic[], filter: Filter): PageClinic[] {
  return clinics.filter(
    (clinic) =>
      fitsAges(clinic, filter.ages) &&
      fitsLevel(clinic, filter.level) &&
      (filter.day === '' || dayOf(clinic) === filter.day) &&
      (filter.coach === '' || clinic.coaches.includes(filter.coach)) &&
      (filter.full === '' || clinic.taken < clinic.capacity),
  )
}

/** A clinic is for juniors, or for adults, when one of that age may take part. */
function fitsAges({ ageMin, ageMax }: PageClinic, ages: Filter['ages']): boolean {
  if (ages === '') return true
  if (ages === 'juniors') return ageMin === null || ageMin < ADULT_YEARS
  return ageMax === null || ageMax >= ADULT_YEARS
}

function fitsLevel({ handicapMin, handicapMax }: PageClinic, level: Filter['level']): boolean {
  if (level === '') return true
  const handicap = LEVELS[level]
  return handicap >= (handicapMin ?? -10) && handicap <= (handicapMax ?? 54)
}

/** The weekday of the next session on the venue's own clock, as JavaScript counts. */
export function dayOf({ startsAt, zone }: Pick<PageClinic, 'startsAt' | 'zone'>): string {
  return String((weekdayOf(localDayOf(startsAt, zone)) + 1) % 7)
}
