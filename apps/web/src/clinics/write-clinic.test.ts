import { describe, expect, it } from 'vitest'
import { draftOf, newDraft } from './draft'
import type { Clinic } from './queries'
import { bodyOf, patternOf } from './write-clinic'

const FIRST = {
  venueId: 'range',
  areaId: 'bays',
  units: 12,
  coachId: 'fintan',
  today: '2026-12-20',
}

/** What a clinic can hold and no word of the sentence says. */
const RARE = {
  title: 'Low and long',
  summary: '',
  about: '',
  bring: '',
  handicapMin: 10,
  handicapMax: 36,
  ageMin: 18,
  ageMax: null,
  capacity: 6,
  saleMode: 'run',
  payMode: 'card',
  runPriceMinor: 108_000,
  dropInPriceMinor: null,
  venueId: 'range',
  startsOnLocal: '2026-09-15',
  startsAtLocal: '18:00',
  durationMinutes: 75,
  rrule: 'FREQ=MONTHLY;BYDAY=3TU;COUNT=6',
  skipDates: ['2026-10-20'],
  coachIds: ['fintan', 'orla', 'sal'],
  areas: [
    { areaId: 'bays', fromUnit: 3, toUnit: 8 },
    { areaId: 'green', fromUnit: 1, toUnit: 1 },
  ],
} as const

describe('a clinic that is changed', () => {
  it('is sent as it was saved when no word is changed', () => {
    // The rest of an answer's clinic is not looked at.
    const clinic = { ...RARE, zone: 'Europe/Dublin', recurrence: 'Words.' } as unknown as Clinic
    expect(bodyOf(draftOf(clinic, 'KWD'), 'KWD')).toEqual({ ok: true, body: RARE })
  })
})

describe('a new clinic', () => {
  it('starts two weeks from the academy’s today, on that weekday', () => {
    expect(patternOf(newDraft(FIRST))).toMatchObject({
      startsOnLocal: '2027-01-03',
      rrule: 'FREQ=WEEKLY;BYDAY=SU;COUNT=8',
    })
  })

  it('says of each word that is missing or cannot be read what is wrong with it', () => {
    const draft = { ...newDraft(FIRST), startsOnLocal: '', sessions: '0', runPrice: '1.2.3' }
    const written = bodyOf(draft, 'EUR')
    expect(written.ok ? [] : Object.keys(written.sentences).sort()).toEqual([
      'rrule',
      'runPriceMinor',
      'startsOnLocal',
    ])
    expect(patternOf(draft)).toBeNull()
  })

  it('asks for no price of what is not sold', () => {
    const free = bodyOf({ ...newDraft(FIRST), payMode: 'free', runPrice: 'nonsense' }, 'EUR')
    expect(free).toMatchObject({ ok: true, body: { runPriceMinor: null, dropInPriceMinor: null } })
    const byRun = bodyOf({ ...newDraft(FIRST), runPrice: '108.00' }, 'EUR')
    expect(byRun).toMatchObject({ ok: true, body: { runPriceMinor: 10_800 } })
  })
})
