import type { Sent } from '@marram/contract'
import { toCurrencyCode, toDecimal } from '@marram/money'
import { shiftDay } from '../academies/local-day'
import { ANY_LEVEL, levelOf, type LevelWords } from './level-words'
import type { Clinic } from './queries'
import { dayCodeOf, wordsOfRule, type RuleWords, type SavedRule } from './rule-words'

export type ClinicBody = Sent<'clinics.draft', 'body'>

/** A clinic while it is being written: what the sentence's words hold. */
export interface Draft extends RuleWords, LevelWords {
  title: string
  summary: string
  about: string
  bring: string
  startsOnLocal: string
  startsAtLocal: string
  durationMinutes: string
  skipDates: string[]
  /** The rule of a clinic that is changed; what no word says of it stays. */
  savedRule: SavedRule | null
  venueId: string
  areaId: string
  fromUnit: string
  toUnit: string
  moreAreas: ClinicBody['areas']
  coachIds: string[]
  capacity: string
  saleMode: ClinicBody['saleMode']
  payMode: ClinicBody['payMode']
  runPrice: string
  dropInPrice: string
}

const FIRST_IN_DAYS = 14

/** A new clinic starts two weeks from today, in the evening, for eight weeks. */
export function newDraft(given: {
  venueId: string
  areaId: string
  units: number
  coachId: string
  /** Where the academy is. */
  today: string
}): Draft {
  const startsOnLocal = shiftDay(given.today, FIRST_IN_DAYS)
  return {
    ...ANY_LEVEL,
    title: '',
    summary: '',
    about: '',
    bring: '',
    weekdays: [dayCodeOf(startsOnLocal)],
    interval: '1',
    startsOnLocal,
    startsAtLocal: '18:00',
    durationMinutes: '75',
    sessions: '8',
    lastDay: '',
    skipDates: [],
    savedRule: null,
    venueId: given.venueId,
    areaId: given.areaId,
    fromUnit: '1',
    toUnit: String(given.units),
    moreAreas: [],
    coachIds: [given.coachId],
    capacity: '6',
    saleMode: 'run',
    payMode: 'card',
    runPrice: '',
    dropInPrice: '',
  }
}

/** No words: of a rule that the sentence cannot say. */
const UNSAID: RuleWords = { interval: '1', weekdays: [], sessions: '', lastDay: '' }

export function draftOf(clinic: Clinic, currency: string): Draft {
  const { rrule, startsOnLocal, zone, recurrence } = clinic
  const savedRule = { rrule, startsOnLocal, zone, recurrence }
  const [area, ...moreAreas] = clinic.areas
  const money = (amountMinor: number | null) =>
    amountMinor === null ? '' : toDecimal({ amountMinor, currency: toCurrencyCode(currency) })
  return {
    ...(wordsOfRule(savedRule) ?? UNSAID),
    ...levelOf(clinic),
    savedRule,
    title: clinic.title,
    summary: clinic.summary,
    about: clinic.about,
    bring: clinic.bring,
    startsOnLocal,
    startsAtLocal: clinic.startsAtLocal,
    durationMinutes: String(clinic.durationMinutes),
    skipDates: clinic.skipDates,
    venueId: clinic.venueId,
    areaId: area?.areaId ?? '',
    fromUnit: String(area?.fromUnit ?? 1),
    toUnit: String(area?.toUnit ?? 1),
    moreAreas,
    coachIds: clinic.coachIds,
    capacity: String(clinic.capacity),
    saleMode: clinic.saleMode,
    payMode: clinic.payMode,
    runPrice: money(clinic.runPriceMinor),
    dropInPrice: money(clinic.dropInPriceMinor),
  }
}

/** Whether its days follow a saved rule that the sentence has no words for. */
export const hasUnsaidRule = ({ savedRule }: Draft): boolean =>
  savedRule !== null && wordsOfRule(savedRule) === null
