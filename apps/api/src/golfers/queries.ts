import { raw } from 'objection'
import { ask } from '../platform/tenancy/ask'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import { Consent, Golfer, MinorLookUp } from './models'

export async function findGolfer(trx: AcademyTrx, id: string): Promise<Golfer | undefined> {
  return Golfer.query(trx).where({ id }).first()
}

export async function findGolferOfAccount(
  trx: AcademyTrx,
  accountId: string,
): Promise<Golfer | undefined> {
  return Golfer.query(trx).where({ accountId }).first()
}

/** Locks a guardian's account, so that two who add the same child come one after the other. */
export async function lockGuardian(trx: AcademyTrx, accountId: string): Promise<void> {
  await trx.raw('SELECT id FROM accounts WHERE id = ? FOR NO KEY UPDATE', [accountId])
}

export async function findDependant(
  trx: AcademyTrx,
  who: { guardianAccountId: string; name: string; bornOn: string },
): Promise<Golfer | undefined> {
  return Golfer.query(trx).where(who).first()
}

/** One whom staff entered with this address, and who has no account or guardian yet. */
export async function findUnclaimedGolfer(
  trx: AcademyTrx,
  email: string,
): Promise<Golfer | undefined> {
  return Golfer.query(trx)
    .where({ email })
    .whereNull('accountId')
    .whereNull('guardianAccountId')
    .orderBy('createdAt')
    .first()
}

/** The person's own golfer first, then those they look after. */
export async function listGolfersOf(trx: AcademyTrx, accountId: string): Promise<Golfer[]> {
  return Golfer.query(trx)
    .where({ accountId })
    .orWhere({ guardianAccountId: accountId })
    .orderByRaw('account_id IS NULL, created_at, id')
}

/** Writes a golfer; a person who is a golfer here already stays the one they are. */
export async function insertGolfer(trx: AcademyTrx, row: Partial<Golfer>): Promise<void> {
  await Golfer.query(trx).insert(row).onConflict(['academy_id', 'account_id']).ignore()
}

export async function updateGolfer(
  trx: AcademyTrx,
  id: string,
  change: Partial<Golfer>,
): Promise<number> {
  return Golfer.query(trx).patch(change).where({ id })
}

export async function insertConsent(
  trx: AcademyTrx,
  row: Pick<Consent, 'id' | 'golferId' | 'kind' | 'wording' | 'givenBy' | 'givenAt'>,
): Promise<void> {
  const { id, golferId, kind, wording, givenBy, givenAt } = row
  await ask(trx, {
    name: 'insert-consent',
    text: `
      INSERT INTO consents (academy_id, id, golfer_id, kind, wording, given_by, given_at)
      VALUES (current_setting('app.academy_id')::uuid, $1, $2, $3, $4, $5, $6)`,
    values: [id, golferId, kind, wording, givenBy, givenAt],
  })
}

export interface ConsentRow {
  kind: string
  givenBy: string
  givenAt: Date
}

export async function listConsents(trx: AcademyTrx, golferId: string): Promise<ConsentRow[]> {
  return Consent.query(trx)
    .join('accounts', 'accounts.id', 'consents.givenBy')
    .where({ golferId })
    .whereNull('withdrawnAt')
    .orderBy('givenAt', 'desc')
    .select('consents.kind', 'accounts.name as givenBy', 'consents.givenAt')
    .castTo<ConsentRow[]>()
}

export async function insertLookUp(trx: AcademyTrx, row: Partial<MinorLookUp>): Promise<void> {
  await MinorLookUp.query(trx).insert(row)
}

export interface GolferListRow extends Golfer {
  accountEmail: string | null
  guardianName: string | null
  placesAhead: number
  /** A session of the coach who asks lies within a few days; false where no coach asks. */
  isNearOwnSession: boolean
}

/** How long before and after a session a coach is concerned with who comes to it. */
const NEAR_DAYS = 7

/**
 * Golfers by name, with what a list needs of each. `coachId` keeps to golfers of that coach's
 * sessions.
 */
export async function searchGolfers(
  trx: AcademyTrx,
  wanted: { search: string; now: Date; coachId?: string; golferId?: string },
): Promise<GolferListRow[]> {
  const query = Golfer.query(trx)
    .leftJoin('accounts as own', 'own.id', 'golfers.accountId')
    .leftJoin('accounts as guardian', 'guardian.id', 'golfers.guardianAccountId')
    .select(
      'golfers.*',
      'own.email as accountEmail',
      'guardian.name as guardianName',
      raw(
        `(SELECT count(*) FROM places p JOIN sessions s
            ON s.academy_id = p.academy_id AND s.id = p.session_id
          WHERE p.academy_id = golfers.academy_id AND p.golfer_id = golfers.id
            AND p.state = 'confirmed' AND s.state = 'planned' AND s.starts_at > ?)`,
        [wanted.now],
      ).as('placesAhead'),
      nearSessionOf(wanted).as('isNearOwnSession'),
    )
    .orderBy(['golfers.name', 'golfers.id'])
    .limit(500)
  if (wanted.golferId) query.where('golfers.id', wanted.golferId)
  if (wanted.search) query.where('golfers.name', 'ilike', `%${escapeLike(wanted.search)}%`)
  if (wanted.coachId) query.where(ofCoach(wanted.coachId))
  return query.castTo<GolferListRow[]>()
}

/** Whether a golfer has or had a place in one of this coach's sessions. */
export async function isGolferOfCoach(
  trx: AcademyTrx,
  { golferId, coachId }: { golferId: string; coachId: string },
): Promise<boolean> {
  const found = await Golfer.query(trx)
    .where('golfers.id', golferId)
    .where(ofCoach(coachId))
    .select('golfers.id')
    .first()
  return found !== undefined
}

/** True for golfers who have or had a place in one of this coach's sessions. */
function ofCoach(coachId: string) {
  return raw(
    `EXISTS (SELECT 1 FROM places p JOIN session_coaches c
        ON c.academy_id = p.academy_id AND c.session_id = p.session_id
      WHERE p.academy_id = golfers.academy_id AND p.golfer_id = golfers.id
        AND p.state = 'confirmed' AND c.coach_id = ?)`,
    [coachId],
  )
}

function nearSessionOf({ coachId, now }: { coachId?: string; now: Date }) {
  if (!coachId) return raw('false')
  const nearMs = NEAR_DAYS * 86_400_000
  return raw(
    `EXISTS (SELECT 1 FROM places p
        JOIN sessions s ON s.academy_id = p.academy_id AND s.id = p.session_id
        JOIN session_coaches c ON c.academy_id = s.academy_id AND c.session_id = s.id
      WHERE p.academy_id = golfers.academy_id AND p.golfer_id = golfers.id
        AND p.state = 'confirmed' AND c.coach_id = ? AND s.starts_at <= ? AND s.ends_at >= ?)`,
    [coachId, new Date(now.getTime() + nearMs), new Date(now.getTime() - nearMs)],
  )
}

function escapeLike(text: string): string {
  return text.replace(/[\\%_]/g, (character) => `\\${character}`)
}
