import { raw } from 'objection'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import { CoachingSettings, Swing, SwingTarget } from './models'

export interface SwingRow extends Swing {
  recorderName: string | null
}

/** Swings that were not taken out, with who recorded them. */
const swingRows = (trx: AcademyTrx) =>
  Swing.query(trx)
    .leftJoin('accounts as recorder', 'recorder.id', 'swings.recordedBy')
    .whereNull('swings.removedAt')
    .select('swings.*', 'recorder.name as recorderName')

export async function findSwing(trx: AcademyTrx, id: string): Promise<SwingRow | undefined> {
  return swingRows(trx).where('swings.id', id).first().castTo<SwingRow | undefined>()
}

/** A golfer's swings, newest first; `before` keeps to those that were recorded before that one. */
export async function listSwings(
  trx: AcademyTrx,
  wanted: { golferId: string; club?: string; before?: string; limit: number },
): Promise<SwingRow[]> {
  const { golferId, club, before, limit } = wanted
  const query = swingRows(trx)
    .where('swings.golferId', golferId)
    .orderBy([
      { column: 'swings.recordedAt', order: 'desc' },
      { column: 'swings.id', order: 'desc' },
    ])
    .limit(limit)
  if (club) query.where('swings.club', club)
  if (before) query.where(recordedBefore({ golferId, before }))
  return query.castTo<SwingRow[]>()
}

/** True of swings before that one, which may have been taken out since. */
function recordedBefore({ golferId, before }: { golferId: string; before: string }) {
  return raw(
    `(swings.recorded_at, swings.id) < (SELECT b.recorded_at, b.id FROM swings b
      WHERE b.academy_id = current_setting('app.academy_id')::uuid
        AND b.golfer_id = ? AND b.id = ?)`,
    [golferId, before],
  )
}

/** Writes a swing; one with the same id stays the one it is. */
export async function insertSwing(trx: AcademyTrx, row: Partial<Swing>): Promise<void> {
  await Swing.query(trx).insert(row).onConflict(['academy_id', 'id']).ignore()
}

export async function markSwingRemoved(
  trx: AcademyTrx,
  { id, ...by }: { id: string; removedAt: Date; removedBy: string },
): Promise<void> {
  await Swing.query(trx).patch(by).where({ id }).whereNull('removedAt')
}

export interface TargetRow extends SwingTarget {
  setterName: string | null
}

/** What a golfer's swings are held against: for every club first, then club by club. */
export async function listTargets(trx: AcademyTrx, golferId: string): Promise<TargetRow[]> {
  return SwingTarget.query(trx)
    .leftJoin('accounts as setter', 'setter.id', 'swingTargets.setBy')
    .where('swingTargets.golferId', golferId)
    .orderByRaw('swing_targets.club NULLS FIRST')
    .select('swing_targets.*', 'setter.name as setterName')
    .castTo<TargetRow[]>()
}

/** Sets a golfer's target for a club, or for all others, in place of the one before. */
export async function setTarget(trx: AcademyTrx, row: Partial<SwingTarget>): Promise<void> {
  const { id: _, ...rest } = row
  await SwingTarget.query(trx)
    .insert(row)
    .onConflict(['academy_id', 'golfer_id', 'club'])
    .merge(rest)
}

export async function findSettings(trx: AcademyTrx): Promise<CoachingSettings | undefined> {
  return CoachingSettings.query(trx).first()
}

/** Changes some of an academy's settings; the first change writes the others as they start. */
export async function changeSettings(
  trx: AcademyTrx,
  { start, change }: { start: Partial<CoachingSettings>; change: Partial<CoachingSettings> },
): Promise<void> {
  await CoachingSettings.query(trx)
    .insert({ ...start, ...change })
    .onConflict(['academy_id'])
    .merge(change)
}
