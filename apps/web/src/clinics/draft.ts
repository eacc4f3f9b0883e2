import type { Sent } from '@marram/contract'
import { toDecimal, toCurrencyCode, parseMoney } from '@marram/money'
import type { Clinic } from './queries'

export type ClinicBody = Sent<'clinics.draft', 'body'>

/** A clinic while it is being written: what the sentence's words hold. */
export interface Draft {
  title: string
  summary: string
  about: string
  bring: string
  weekdays: string[]
  interval: string
  startsOnLocal: string
  startsAtLocal: string
  durationMinutes: string
  sessions: string
  skipDates: string[]
  venueId: string
  areaId: string
  fromUnit: string
  toUnit: string
  moreAreas: ClinicBody['areas']
  coachIds: string[]
  capacity: string
  level: 'any' | 'adults' | 'juniors' | 'handicap'
  from: string
  to: string
  saleMode: ClinicBody['saleMode']
  payMode: ClinicBody['payMode']
  runPrice: string
  dropInPrice: string
}

const WEEKDAYS = ['SU', 'MO', 'TU', 'WE', 'TH', 'FR', 'SA']
const FIRST_IN_DAYS = 14

/** A new clinic starts two weeks from today, in the evening, for eight weeks. */
export function newDraft(given: {
  venueId: string
  areaId: string
  units: number
  coachId: string
}): Draft {
  const day = new Date(Date.now() + FIRST_IN_DAYS * 86_400_000)
  return {
    title: '',
    summary: '',
    about: '',
    bring: '',
    weekdays: [WEEKDAYS[day.getDay()] ?? 'MO'],
    interval: '1',
    startsOnLocal: new Intl.DateTimeFormat('en-CA').format(day),
    startsAtLocal: '18:00',
    durationMinutes: '75',
    sessions: '8',
    skipDates: [],
    venueId: given.venueId,
    areaId: given.areaId,
    fromUnit: '1',
    toUnit: String(given.units),
    moreAreas: [],
    coachIds: [given.coachId],
    capacity: '6',
    level: 'any',
    from: '',
    to: '',
    saleMode: 'run',
    payMode: 'card',
    runPrice: '',
    dropInPrice: '',
  }
}

export function draftOf(clinic: Clinic, currency: string): Draft {
  const rule = new Map(clinic.rrule.split(';').map((part) => part.split('=') as [string, string]))
  const [area, ...moreAreas] = clinic.areas
  const isJunior = clinic.ageMax !== null && clinic.ageMax < 18
  const money = (amountMinor: number | null) =>
    amountMinor === null ? '' : toDecimal({ amountMinor, currency: toCurrencyCode(currency) })
  const byHandicap = clinic.handicapMin !== null || clinic.handicapMax !== null
  const byAge = clinic.ageMin !== null || clinic.ageMax !== null
  return {
    title: clinic.title,
    summary: clinic.summary,
    about: clinic.about,
    bring: clinic.bring,
    weekdays: (rule.get('BYDAY') ?? '').split(',').filter(Boolean),
    interval: rule.get('INTERVAL') ?? '1',
    startsOnLocal: clinic.startsOnLocal,
    startsAtLocal: clinic.startsAtLocal,
    durationMinutes: String(clinic.durationMinutes),
    sessions: rule.get('COUNT') ?? String(clinic.sessions.length),
    skipDates: clinic.skipDates,
    venueId: clinic.venueId,
    areaId: area?.areaId ?? '',
    fromUnit: String(area?.fromUnit ?? 1),
    toUnit: String(area?.toUnit ?? 1),
    moreAreas,
    coachIds: clinic.coachIds,
    capacity: String(clinic.capacity),
    level: byAge ? (isJunior ? 'juniors' : 'adults') : byHandicap ? 'handicap' : 'any',
    from: String((byAge ? clinic.ageMin : clinic.handicapMin) ?? ''),
    to: String((byAge ? clinic.ageMax : clinic.handicapMax) ?? ''),
    saleMode: clinic.saleMode,
    payMode: clinic.payMode,
    runPrice: money(clinic.runPriceMinor),
    dropInPrice: money(clinic.dropInPriceMinor),
  }
}

export function ruleOf({ weekdays, interval, sessions }: Draft): string {
  const every = Number(interval) > 1 ? `INTERVAL=${interval};` : ''
  return `FREQ=WEEKLY;${every}BYDAY=${weekdays.join(',')};COUNT=${sessions}`
}

/** What is sent for a preview; null while a word is still missing. */
export function patternOf(draft: Draft): Sent<'clinics.preview', 'body'> | null {
  const isWhole =
    draft.weekdays.length > 0 &&
    /^\d{4}-\d\d-\d\d$/.test(draft.startsOnLocal) &&
    /^\d\d:\d\d$/.test(draft.startsAtLocal) &&
    [draft.durationMinutes, draft.sessions, draft.fromUnit, draft.toUnit].every(
      (text) => Number(text) >= 1,
    ) &&
    draft.venueId !== '' &&
    draft.areaId !== '' &&
    draft.coachIds.length > 0
  if (!isWhole) return null
  return {
    venueId: draft.venueId,
    startsOnLocal: draft.startsOnLocal,
    startsAtLocal: draft.startsAtLocal,
    durationMinutes: Number(draft.durationMinutes),
    rrule: ruleOf(draft),
    skipDates: draft.skipDates,
    coachIds: draft.coachIds,
    areas: [
      { areaId: draft.areaId, fromUnit: Number(draft.fromUnit), toUnit: Number(draft.toUnit) },
      ...draft.moreAreas,
    ],
  }
}

export type Written =
  | { ok: true; body: ClinicBody }
  | { ok: false; field: 'runPrice' | 'dropInPrice' | 'dates'; sentence: string }

/** The whole clinic as it is sent, or the sentence that says what is missing. */
export function bodyOf(draft: Draft, currency: string): Written {
  const pattern = patternOf(draft)
  if (!pattern)
    return { ok: false, field: 'dates', sentence: 'Please say when, where and with whom.' }
  const isFree = draft.payMode === 'free'
  const run = isFree || draft.saleMode === 'drop-in' ? null : readPrice(draft.runPrice, currency)
  if (run && !run.ok) return { ok: false, field: 'runPrice', sentence: run.sentence }
  const dropIn = isFree || draft.saleMode === 'run' ? null : readPrice(draft.dropInPrice, currency)
  if (dropIn && !dropIn.ok) return { ok: false, field: 'dropInPrice', sentence: dropIn.sentence }
  const number = (text: string) => (text.trim() === '' ? null : Number(text))
  const isByAge = draft.level === 'juniors' || draft.level === 'adults'
  return {
    ok: true,
    body: {
      ...pattern,
      title: draft.title,
      summary: draft.summary,
      about: draft.about,
      bring: draft.bring,
      ageMin: isByAge ? (number(draft.from) ?? (draft.level === 'adults' ? 18 : null)) : null,
      ageMax: isByAge ? (number(draft.to) ?? (draft.level === 'juniors' ? 17 : null)) : null,
      handicapMin: draft.level === 'handicap' ? number(draft.from) : null,
      handicapMax: draft.level === 'handicap' ? number(draft.to) : null,
      capacity: Number(draft.capacity),
      saleMode: draft.saleMode,
      payMode: draft.payMode,
      runPriceMinor: run?.amountMinor ?? null,
      dropInPriceMinor: dropIn?.amountMinor ?? null,
    },
  }
}

function readPrice(
  text: string,
  currency: string,
): { ok: true; amountMinor: number } | { ok: false; sentence: string } {
  const read = parseMoney(text, toCurrencyCode(currency))
  return read.ok
    ? { ok: true, amountMinor: read.amountMinor }
    : { ok: false, sentence: read.sentence }
}
