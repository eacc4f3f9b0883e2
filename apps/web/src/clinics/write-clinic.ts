import type { Sent } from '@marram/contract'
import { parseMoney, toCurrencyCode } from '@marram/money'
import { hasUnsaidRule, type ClinicBody, type Draft } from './draft'
import { rangesOf } from './level-words'
import { ruleOf } from './rule-words'

/** Sentences by the field of the clinic that they are about. */
type Sentences = Record<string, string>

/** What is sent for a preview; null while a word is still missing. */
export function patternOf(draft: Draft): Sent<'clinics.preview', 'body'> | null {
  if (Object.keys(missingIn(draft)).length > 0) return null
  return {
    venueId: draft.venueId,
    startsOnLocal: draft.startsOnLocal,
    startsAtLocal: draft.startsAtLocal,
    durationMinutes: Number(draft.durationMinutes),
    rrule: ruleOf(draft, draft.savedRule),
    skipDates: draft.skipDates,
    coachIds: draft.coachIds,
    areas: [
      { areaId: draft.areaId, fromUnit: Number(draft.fromUnit), toUnit: Number(draft.toUnit) },
      ...draft.moreAreas,
    ],
  }
}

/** The whole clinic as it is sent, or what is missing or cannot be read, word by word. */
export function bodyOf(
  draft: Draft,
  currency: string,
): { ok: true; body: ClinicBody } | { ok: false; sentences: Sentences } {
  const pattern = patternOf(draft)
  const isFree = draft.payMode === 'free'
  const isRunSold = !isFree && draft.saleMode !== 'drop-in'
  const isDropInSold = !isFree && draft.saleMode !== 'run'
  const run = isRunSold ? readPrice(draft.runPrice, currency) : null
  const dropIn = isDropInSold ? readPrice(draft.dropInPrice, currency) : null
  if (!pattern || run?.ok === false || dropIn?.ok === false) {
    const sentences = {
      ...missingIn(draft),
      ...(run?.ok === false ? { runPriceMinor: run.sentence } : {}),
      ...(dropIn?.ok === false ? { dropInPriceMinor: dropIn.sentence } : {}),
    }
    return { ok: false, sentences }
  }
  return {
    ok: true,
    body: {
      ...pattern,
      ...rangesOf(draft),
      title: draft.title,
      summary: draft.summary,
      about: draft.about,
      bring: draft.bring,
      capacity: Number(draft.capacity),
      saleMode: draft.saleMode,
      payMode: draft.payMode,
      runPriceMinor: run?.amountMinor ?? null,
      dropInPriceMinor: dropIn?.amountMinor ?? null,
    },
  }
}

function missingIn(draft: Draft): Sentences {
  const isCount = (text: string) => Number(text) >= 1
  const isKept = hasUnsaidRule(draft)
  const hasEnd = isKept || draft.lastDay !== '' || isCount(draft.sessions)
  const checks: [field: string, isThere: boolean, sentence: string][] = [
    ['rrule', isKept || draft.weekdays.length > 0, 'Please say on which weekday it is.'],
    ['rrule', hasEnd, 'Please say how many sessions there are.'],
    ['startsOnLocal', /^\d{4}-\d\d-\d\d$/.test(draft.startsOnLocal), 'Please say the first day.'],
    ['startsAtLocal', /^\d\d:\d\d$/.test(draft.startsAtLocal), 'Please say when it starts.'],
    ['durationMinutes', isCount(draft.durationMinutes), 'Please say how long it takes.'],
    ['venueId', draft.venueId !== '', 'Please say where it is.'],
    [
      'areas',
      draft.areaId !== '' && isCount(draft.fromUnit) && isCount(draft.toUnit),
      'Please say on which area it is, and on which bays.',
    ],
    ['coachIds', draft.coachIds.length > 0, 'Please say with whom it is.'],
  ]
  return Object.fromEntries(
    checks.filter(([, isThere]) => !isThere).map(([field, , sentence]) => [field, sentence]),
  )
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
