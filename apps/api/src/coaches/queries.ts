import type { AcademyTrx } from '../platform/tenancy/transaction'
import { Coach } from './models'

export async function listCoaches(trx: AcademyTrx): Promise<Coach[]> {
  return Coach.query(trx).orderBy(['createdAt', 'id'])
}

export async function findCoaches(trx: AcademyTrx, ids: readonly string[]): Promise<Coach[]> {
  return Coach.query(trx).whereIn('id', [...ids])
}

export async function findCoachOf(trx: AcademyTrx, accountId: string): Promise<Coach | undefined> {
  return Coach.query(trx).where({ accountId }).first()
}

export async function insertCoach(trx: AcademyTrx, row: Partial<Coach>): Promise<void> {
  await Coach.query(trx).insert(row)
}

export async function updateCoach(
  trx: AcademyTrx,
  id: string,
  change: Partial<Coach>,
): Promise<number> {
  return Coach.query(trx).patch(change).where({ id })
}
