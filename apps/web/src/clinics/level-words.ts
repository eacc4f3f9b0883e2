import type { ClinicBody } from './draft'

/** Whom a clinic is for, as its sentence says it. */
export interface LevelWords {
  level: 'any' | 'adults' | 'juniors' | 'handicap' | 'both'
  /** Of the age; of the handicap where no age is asked for. */
  from: string
  to: string
  /** Of the handicap, where an age is asked for too. */
  handicapFrom: string
  handicapTo: string
}

type Ranges = Pick<ClinicBody, 'ageMin' | 'ageMax' | 'handicapMin' | 'handicapMax'>

export const ANY_LEVEL: LevelWords = {
  level: 'any',
  from: '',
  to: '',
  handicapFrom: '',
  handicapTo: '',
}

const ADULT_YEARS = 18

/** What another choice of level begins with; every limit stands in the sentence to be read. */
export function levelChosen(level: LevelWords['level']): LevelWords {
  return {
    ...ANY_LEVEL,
    level,
    from: level === 'adults' ? String(ADULT_YEARS) : '',
    to: level === 'juniors' ? String(ADULT_YEARS - 1) : '',
  }
}

export function levelOf({ ageMin, ageMax, handicapMin, handicapMax }: Ranges): LevelWords {
  const text = (limit: number | null) => (limit === null ? '' : String(limit))
  const byAge = ageMin !== null || ageMax !== null
  const byHandicap = handicapMin !== null || handicapMax !== null
  const ages = { from: text(ageMin), to: text(ageMax) }
  if (byAge && byHandicap) {
    const handicaps = { handicapFrom: text(handicapMin), handicapTo: text(handicapMax) }
    return { level: 'both', ...ages, ...handicaps }
  }
  if (byHandicap) {
    return { ...ANY_LEVEL, level: 'handicap', from: text(handicapMin), to: text(handicapMax) }
  }
  if (!byAge) return ANY_LEVEL
  const isJunior = ageMax !== null && ageMax < ADULT_YEARS
  return { ...ANY_LEVEL, level: isJunior ? 'juniors' : 'adults', ...ages }
}

export function rangesOf({ level, from, to, handicapFrom, handicapTo }: LevelWords): Ranges {
  const limit = (text: string) => (text.trim() === '' ? null : Number(text))
  const ages = { ageMin: limit(from), ageMax: limit(to) }
  const none = { ageMin: null, ageMax: null, handicapMin: null, handicapMax: null }
  switch (level) {
    case 'any':
      return none
    case 'adults':
    case 'juniors':
      return { ...none, ...ages }
    case 'handicap':
      return { ...none, handicapMin: limit(from), handicapMax: limit(to) }
    case 'both':
      return { ...ages, handicapMin: limit(handicapFrom), handicapMax: limit(handicapTo) }
  }
}
