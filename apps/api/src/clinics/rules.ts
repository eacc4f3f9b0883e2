import { describeRecurrence, parseRecurrence } from '@marram/schedule'
import { Problem } from '../platform/errors'
import type { AreaUse } from './queries'

interface Priced {
  saleMode: 'run' | 'drop-in' | 'both'
  payMode: 'card' | 'desk' | 'free'
  runPriceMinor: number | null
  dropInPriceMinor: number | null
}

/** A clinic has a price for each way it is sold, unless it is free. Throws `invalid-fields`. */
export function checkPrices({ saleMode, payMode, runPriceMinor, dropInPriceMinor }: Priced): void {
  if (payMode === 'free') return
  if (saleMode !== 'drop-in' && !runPriceMinor) {
    const sentence = 'Please give a price for the run, or make the clinic free.'
    throw new Problem('invalid-fields', sentence, { runPriceMinor: sentence })
  }
  if (saleMode !== 'run' && !dropInPriceMinor) {
    const sentence = 'Please give a price for one session, or make the clinic free.'
    throw new Problem('invalid-fields', sentence, { dropInPriceMinor: sentence })
  }
}

interface Levelled {
  ageMin: number | null
  ageMax: number | null
  handicapMin: number | null
  handicapMax: number | null
}

/** A clinic is for somebody: its ranges are not the wrong way round. Throws `invalid-fields`. */
export function checkLevel({ ageMin, ageMax, handicapMin, handicapMax }: Levelled): void {
  if (ageMin !== null && ageMax !== null && ageMin > ageMax) {
    const sentence = 'The youngest age is above the oldest.'
    throw new Problem('invalid-fields', sentence, { ageMax: sentence })
  }
  if (handicapMin !== null && handicapMax !== null && handicapMin > handicapMax) {
    const sentence = 'The lowest handicap is above the highest.'
    throw new Problem('invalid-fields', sentence, { handicapMax: sentence })
  }
}

interface Schedule {
  venueId: string
  startsOnLocal: string
  startsAtLocal: string
  durationMinutes: number
  rrule: string
  skipDates: readonly string[]
  coachIds: readonly string[]
  areas: readonly AreaUse[]
}

/** Says whether two descriptions give the same dates, coaches and bays. */
export function isSameSchedule(a: Schedule, b: Schedule): boolean {
  return asText(a) === asText(b)
}

function asText(schedule: Schedule): string {
  const { venueId, startsOnLocal, startsAtLocal, durationMinutes, rrule } = schedule
  return JSON.stringify([
    venueId,
    startsOnLocal,
    startsAtLocal.slice(0, 5),
    durationMinutes,
    rrule,
    [...schedule.skipDates].sort(),
    schedule.coachIds,
    schedule.areas.map(asUnits),
  ])
}

interface Meeting {
  startsAt: Date
  endsAt: Date
  coachIds: readonly string[]
  areas: readonly AreaUse[]
}

/** Says whether golfers of a session find the same people at the same place and time. */
export function isSameMeeting(a: Meeting, b: Meeting): boolean {
  return meetingAsText(a) === meetingAsText(b)
}

function meetingAsText({ startsAt, endsAt, coachIds, areas }: Meeting): string {
  return JSON.stringify([startsAt, endsAt, coachIds, areas.map(asUnits)])
}

const asUnits = ({ areaId, fromUnit, toUnit }: AreaUse) => [areaId, fromUnit, toUnit]

/** A stored rule in plain words: "Every Tuesday". */
export function describeRule({
  rrule,
  zone,
  startsOnLocal,
}: {
  rrule: string
  zone: string
  startsOnLocal: string
}): string {
  const parsed = parseRecurrence(rrule, { zone })
  return parsed.ok ? describeRecurrence(parsed.rule, { startsOnLocal }) : ''
}
