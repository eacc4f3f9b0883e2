import type { Answer, Parsed } from '@marram/contract'
import { readAcademy } from '../academies/academies'
import { notFound } from '../platform/errors'
import { newId } from '../platform/ids'
import { invariant } from '../platform/invariant'
import type { Services } from '../platform/services'
import { inAcademy } from '../platform/tenancy/transaction'
import type { Area, Venue } from './models'
import {
  findAreas,
  findVenue,
  insertArea,
  insertVenue,
  listAreas,
  listVenues,
  updateArea,
  updateVenue,
} from './queries'

type VenueView = Answer<'venues.add'>
type AreaView = Answer<'areas.add'>

export async function readVenues(
  { db }: Services,
  academyId: string,
): Promise<Answer<'venues.list'>> {
  return inAcademy(db, academyId, async (trx) => {
    const areas = await listAreas(trx)
    const venues = await listVenues(trx)
    return { venues: venues.map((venue) => viewVenue(venue, areas)) }
  })
}

/** Adds a venue; its zone is the academy's unless it says otherwise. */
export async function addVenue(
  { db, clock }: Services,
  { academyId, wanted }: { academyId: string; wanted: Parsed<'venues.add', 'body'> },
): Promise<VenueView> {
  return inAcademy(db, academyId, async (trx) => {
    const now = clock.now()
    const id = newId(now)
    const { zone } = await readAcademy(trx)
    const { address = '', gettingHere = '', ...rest } = wanted
    const own = { ...rest, zone: rest.zone ?? zone, address, gettingHere }
    await insertVenue(trx, { id, ...own, createdAt: now })
    const venue = await findVenue(trx, id)
    invariant(venue, 'the venue was just written')
    return viewVenue(venue, [])
  })
}

export async function changeVenue(
  { db }: Services,
  wanted: { academyId: string; venueId: string; change: Parsed<'venues.change', 'body'> },
): Promise<VenueView> {
  return inAcademy(db, wanted.academyId, async (trx) => {
    if (Object.keys(wanted.change).length > 0) {
      await updateVenue(trx, wanted.venueId, wanted.change as Partial<Venue>)
    }
    const venue = await findVenue(trx, wanted.venueId)
    if (!venue) throw notFound('venue')
    return viewVenue(venue, await listAreas(trx))
  })
}

export async function addArea(
  { db, clock }: Services,
  wanted: { academyId: string; venueId: string; area: Parsed<'areas.add', 'body'> },
): Promise<AreaView> {
  return inAcademy(db, wanted.academyId, async (trx) => {
    if (!(await findVenue(trx, wanted.venueId))) throw notFound('venue')
    const now = clock.now()
    const id = newId(now)
    await insertArea(trx, { id, venueId: wanted.venueId, ...wanted.area, createdAt: now })
    return { id, venueId: wanted.venueId, ...wanted.area }
  })
}

export async function changeArea(
  { db }: Services,
  wanted: { academyId: string; areaId: string; change: Parsed<'areas.change', 'body'> },
): Promise<AreaView> {
  return inAcademy(db, wanted.academyId, async (trx) => {
    if (Object.keys(wanted.change).length > 0) {
      await updateArea(trx, wanted.areaId, wanted.change as Partial<Area>)
    }
    const [area] = await findAreas(trx, [wanted.areaId])
    if (!area) throw notFound('area')
    return viewArea(area)
  })
}

function viewVenue(venue: Venue, areas: readonly Area[]): VenueView {
  const { id, name, address, gettingHere, latitudeDeg, longitudeDeg, zone } = venue
  const own = areas.filter(({ venueId }) => venueId === id)
  return {
    id,
    name,
    address,
    gettingHere,
    latitudeDeg,
    longitudeDeg,
    zone,
    areas: own.map(viewArea),
  }
}

function viewArea({ id, venueId, name, kind, units, hasLamps, isCovered }: Area): AreaView {
  return { id, venueId, name, kind, units, hasLamps, isCovered }
}

export { findAreas, findVenue, listAreas, listVenues } from './queries'
export type { Area, Venue } from './models'
