import type { AcademyTrx } from '../platform/tenancy/transaction'
import { Area, Venue } from './models'

export async function listVenues(trx: AcademyTrx): Promise<Venue[]> {
  return Venue.query(trx).orderBy(['createdAt', 'id'])
}

export async function findVenue(trx: AcademyTrx, id: string): Promise<Venue | undefined> {
  return Venue.query(trx).where({ id }).first()
}

export async function listAreas(trx: AcademyTrx): Promise<Area[]> {
  return Area.query(trx).orderBy(['createdAt', 'id'])
}

export async function findAreas(trx: AcademyTrx, ids: readonly string[]): Promise<Area[]> {
  return Area.query(trx).whereIn('id', [...ids])
}

export async function insertVenue(trx: AcademyTrx, row: Partial<Venue>): Promise<void> {
  await Venue.query(trx).insert(row)
}

export async function insertArea(trx: AcademyTrx, row: Partial<Area>): Promise<void> {
  await Area.query(trx).insert(row)
}

/** Resolves to how many rows changed: 0 for an id that is not of this academy. */
export async function updateVenue(
  trx: AcademyTrx,
  id: string,
  change: Partial<Venue>,
): Promise<number> {
  return Venue.query(trx).patch(change).where({ id })
}

export async function updateArea(
  trx: AcademyTrx,
  id: string,
  change: Partial<Area>,
): Promise<number> {
  return Area.query(trx).patch(change).where({ id })
}
