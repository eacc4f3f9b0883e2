import { planRun, type RunDate } from '@marram/schedule'
import { findCoaches } from '../coaches/coaches'
import { Problem } from '../platform/errors'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import { findAreas, findVenue, type Area, type Venue } from '../venues/venues'
import type { AreaUse } from './queries'

export interface Pattern {
  venueId: string
  startsOnLocal: string
  startsAtLocal: string
  durationMinutes: number
  rrule: string
  skipDates: readonly string[]
  coachIds: readonly string[]
  areas: readonly AreaUse[]
}

export interface Plan {
  venue: Venue
  areas: Area[]
  dates: RunDate[]
  /** "Every Tuesday". */
  recurrence: string
}

const oneField = (field: string, sentence: string) =>
  new Problem('invalid-fields', sentence, { [field]: sentence })

/** Works out the dates of a run, having checked that its venue, areas, units and coaches are ours. */
export async function planClinic(trx: AcademyTrx, pattern: Pattern): Promise<Plan> {
  const venue = await findVenue(trx, pattern.venueId)
  if (!venue) throw oneField('venueId', 'Please choose a venue.')
  const areas = await checkAreas(trx, { venueId: venue.id, areas: pattern.areas })
  await checkCoaches(trx, pattern.coachIds)
  const run = planRun({
    rruleText: pattern.rrule,
    startsOnLocal: pattern.startsOnLocal,
    startsAtLocal: pattern.startsAtLocal.slice(0, 5),
    durationMinutes: pattern.durationMinutes,
    skipDates: [...pattern.skipDates],
    zone: venue.zone,
  })
  if (!run.ok) throw oneField('rrule', run.sentence)
  return { venue, areas, dates: run.dates, recurrence: run.description }
}

/** Checks that the areas are of this venue and have the units asked for. */
export async function checkAreas(
  trx: AcademyTrx,
  { venueId, areas }: { venueId: string; areas: readonly AreaUse[] },
): Promise<Area[]> {
  const ids = areas.map(({ areaId }) => areaId)
  if (new Set(ids).size !== ids.length) throw oneField('areas', 'An area can be named once.')
  const found = new Map((await findAreas(trx, ids)).map((area) => [area.id, area]))
  return areas.map(({ areaId, fromUnit, toUnit }) => {
    const area = found.get(areaId)
    if (!area || area.venueId !== venueId)
      throw oneField('areas', 'Please choose an area of this venue.')
    if (toUnit < fromUnit || toUnit > area.units) {
      throw oneField('areas', `${area.name} has ${area.units} to choose from, counted from 1.`)
    }
    return area
  })
}

export async function checkCoaches(trx: AcademyTrx, coachIds: readonly string[]): Promise<void> {
  const found = await findCoaches(trx, coachIds)
  const isEachOnce = new Set(coachIds).size === coachIds.length
  if (!isEachOnce || found.length !== coachIds.length) {
    throw oneField('coachIds', 'Please choose coaches of this academy, each once.')
  }
}
