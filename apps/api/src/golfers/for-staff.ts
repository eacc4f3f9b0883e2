import type { Answer, Parsed, Scope } from '@marram/contract'
import { readAcademy } from '../academies/academies'
import { findCoachOf } from '../coaches/coaches'
import { notFound } from '../platform/errors'
import { newId } from '../platform/ids'
import { invariant } from '../platform/invariant'
import { localDayOf } from '../platform/local-day'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { refuseBornLater } from './golfers'
import { datedHandicap } from './handicap'
import type { Golfer } from './models'
import {
  insertGolfer,
  insertLookUp,
  isGolferOfCoach,
  listConsents,
  searchGolfers,
  updateGolfer,
  type GolferListRow,
} from './queries'
import { ageOn, contactOf, isMinor } from './rules'

/** Whose golfers a member of staff may see: everybody's, or those of a coach's own sessions. */
export interface Reach {
  academyId: string
  accountId: string
  scope: 'all' | 'own'
  /** Of a minor's contacts and consents; `own` reaches to the days around a coach's sessions. */
  minors: Scope | null
}

export async function listGolfers(
  { db, clock }: Services,
  { reach, search }: { reach: Reach; search: string },
): Promise<Answer<'golfers.list'>> {
  return inAcademy(db, reach.academyId, async (trx) => {
    const coach = await coachOfReach(trx, reach)
    if (coach === 'nobody') return { golfers: [] }
    const now = clock.now()
    const { zone } = await readAcademy(trx)
    const rows = await searchGolfers(trx, { search, now, ...coach })
    const today = localDayOf(now, zone)
    return {
      golfers: rows.map((row) => {
        return viewListItem(row, { today, hasContacts: maySeeContacts(row, { reach, today }) })
      }),
    }
  })
}

/**
 * One golfer for staff. Looking at a minor's contacts and consents is written down; who may not see
 * them gets the rest.
 */
export async function readGolfer(
  { db, clock }: Services,
  {
    reach,
    golferId,
    creditOf,
  }: {
    reach: Reach
    golferId: string
    creditOf: (trx: AcademyTrx, golferId: string) => Promise<number>
  },
): Promise<Answer<'golfers.read'>> {
  return inAcademy(db, reach.academyId, async (trx) => {
    const coach = await coachOfReach(trx, reach)
    if (coach === 'nobody') throw notFound('golfer')
    const now = clock.now()
    const { zone } = await readAcademy(trx)
    const [row] = await searchGolfers(trx, { search: '', now, golferId, ...coach })
    if (!row) throw notFound('golfer')
    const today = localDayOf(now, zone)
    const hasContacts = maySeeContacts(row, { reach, today })
    if (hasContacts && isMinor(row, today)) {
      const seen = { golferId, accountId: reach.accountId, lookedAt: now }
      await insertLookUp(trx, { id: newId(now), ...seen })
    }
    const consents = hasContacts ? await listConsents(trx, golferId) : []
    return {
      ...viewListItem(row, { today, hasContacts }),
      hasContacts,
      bornOn: row.bornOn,
      ageYears: row.bornOn ? ageOn(row.bornOn, today) : null,
      notes: row.notes,
      emergencyContact: hasContacts ? contactOf(row) : null,
      consents: consents.map(({ givenAt, ...rest }) => ({
        ...rest,
        givenAt: givenAt.toISOString(),
      })),
      creditMinor: await creditOf(trx, golferId),
    }
  })
}

/** Enters a golfer who has no account yet. */
export async function enterGolfer(
  { db, clock }: Services,
  { academyId, wanted }: { academyId: string; wanted: Parsed<'golfers.enter', 'body'> },
): Promise<Answer<'golfers.enter'>> {
  return inAcademy(db, academyId, async (trx) => {
    const now = clock.now()
    const id = newId(now)
    await refuseBornLater(trx, { bornOn: wanted.bornOn, now })
    await insertGolfer(trx, {
      id,
      name: wanted.name,
      email: wanted.email ?? null,
      phone: wanted.phone ?? null,
      bornOn: wanted.bornOn ?? null,
      ...(await datedHandicap(trx, { handicap: wanted.handicap ?? null, now })),
      hand: wanted.hand ?? 'right',
      notes: wanted.notes ?? '',
      emergencyName: wanted.emergencyContact?.name ?? null,
      emergencyPhone: wanted.emergencyContact?.phone ?? null,
      createdAt: now,
    })
    const { zone } = await readAcademy(trx)
    const [row] = await searchGolfers(trx, { search: '', now, golferId: id })
    invariant(row, 'the golfer was just written')
    return viewListItem(row, { today: localDayOf(now, zone), hasContacts: true })
  })
}

export async function changeGolfer(
  { db, clock }: Services,
  wanted: { academyId: string; golferId: string; change: Parsed<'golfers.change', 'body'> },
): Promise<void> {
  const { handicap, ...rest } = wanted.change
  await inAcademy(db, wanted.academyId, async (trx) => {
    const dated =
      handicap === undefined ? {} : await datedHandicap(trx, { handicap, now: clock.now() })
    const change = { ...rest, ...dated }
    if (Object.keys(change).length > 0) {
      await updateGolfer(trx, wanted.golferId, change as Partial<Golfer>)
    }
  })
}

/** Whether a golfer of this academy is within somebody's reach. */
export async function isInReach(
  trx: AcademyTrx,
  { reach, golferId }: { reach: Pick<Reach, 'scope' | 'accountId'>; golferId: string },
): Promise<boolean> {
  const coach = await coachOfReach(trx, reach)
  if (coach === 'nobody') return false
  return coach.coachId ? isGolferOfCoach(trx, { golferId, coachId: coach.coachId }) : true
}

async function coachOfReach(
  trx: AcademyTrx,
  { scope, accountId }: Pick<Reach, 'scope' | 'accountId'>,
): Promise<{ coachId?: string } | 'nobody'> {
  if (scope === 'all') return {}
  const coach = await findCoachOf(trx, accountId)
  return coach ? { coachId: coach.id } : 'nobody'
}

function maySeeContacts(
  row: GolferListRow,
  { reach, today }: { reach: Reach; today: string },
): boolean {
  if (!isMinor(row, today) || reach.minors === 'all') return true
  return reach.minors === 'own' && row.isNearOwnSession
}

function viewListItem(
  row: GolferListRow,
  { today, hasContacts }: { today: string; hasContacts: boolean },
): Answer<'golfers.enter'> {
  return {
    id: row.id,
    name: row.name,
    email: hasContacts ? (row.accountEmail ?? row.email) : null,
    isJunior: isMinor(row, today),
    guardianName: hasContacts ? row.guardianName : null,
    handicap: row.handicap,
    hand: row.hand,
    placesAhead: row.placesAhead,
  }
}
