import type { Answer, Parsed } from '@marram/contract'
import { readAcademy } from '../academies/academies'
import { findCoachOf } from '../coaches/coaches'
import { Problem, notFound } from '../platform/errors'
import { newId } from '../platform/ids'
import { invariant } from '../platform/invariant'
import type { Services } from '../platform/services'
import { localDayOf } from '../platform/local-day'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import type { Golfer } from './models'
import {
  findDependant,
  findGolfer,
  findGolferOfAccount,
  findUnclaimedGolfer,
  insertConsent,
  insertGolfer,
  insertLookUp,
  listConsents,
  listGolfersOf,
  searchGolfers,
  updateGolfer,
  type GolferListRow,
} from './queries'
import { ADULT_AGE_YEARS, ageOn } from './rules'

type OwnGolferView = Answer<'golfers.add-dependant'>
type Dependant = Parsed<'golfers.add-dependant', 'body'>

export interface Person {
  id: string
  name: string
  email: string
  isVerified: boolean
}

export async function readMyGolfers(
  { db, clock }: Services,
  { academyId, person }: { academyId: string; person: Person },
): Promise<Answer<'golfers.mine'>> {
  return inAcademy(db, academyId, async (trx) => {
    const { zone } = await readAcademy(trx)
    const today = localDayOf(clock.now(), zone)
    const golfers = await listGolfersOf(trx, person.id)
    return { golfers: golfers.map((golfer) => viewOwn(golfer, today)) }
  })
}

/**
 * The golfer that the person themselves is here, made when there is none. One whom staff entered
 * under the person's confirmed address becomes theirs, with all their places.
 */
export async function ensureOwnGolfer(
  { clock }: Services,
  trx: AcademyTrx,
  { person, handicap }: { person: Person; handicap?: number | null },
): Promise<Golfer> {
  const now = clock.now()
  let golfer = await findGolferOfAccount(trx, person.id)
  if (!golfer) {
    const entered = person.isVerified ? await findUnclaimedGolfer(trx, person.email) : undefined
    if (entered) await updateGolfer(trx, entered.id, { accountId: person.id })
    else
      await insertGolfer(trx, {
        id: newId(now),
        accountId: person.id,
        name: person.name,
        createdAt: now,
      })
    golfer = await findGolferOfAccount(trx, person.id)
    invariant(golfer, 'the person has a golfer by now')
  }
  if (handicap !== undefined && handicap !== golfer.handicap) {
    await updateGolfer(trx, golfer.id, { handicap, handicapOn: now.toISOString().slice(0, 10) })
    golfer.handicap = handicap
  }
  return golfer
}

/**
 * Adds somebody whom the person looks after, with the consent given in the same step. The same child
 * sent again, as after an answer that never arrived, is the one that was added then.
 */
export async function addDependant(
  { clock }: Services,
  trx: AcademyTrx,
  { guardianId, dependant }: { guardianId: string; dependant: Dependant },
): Promise<Golfer> {
  const now = clock.now()
  const { name, bornOn } = dependant
  const had = await findDependant(trx, { guardianAccountId: guardianId, name, bornOn })
  if (had) return had
  const { safeguarding, zone } = await readAcademy(trx)
  if (bornOn > localDayOf(now, zone)) throw bornLater()
  const id = newId(now)
  await insertGolfer(trx, {
    id,
    guardianAccountId: guardianId,
    name,
    bornOn,
    handicap: dependant.handicap,
    handicapOn: dependant.handicap === null ? null : now.toISOString().slice(0, 10),
    emergencyName: dependant.emergencyContact.name,
    emergencyPhone: dependant.emergencyContact.phone,
    createdAt: now,
  })
  await recordConsent(trx, {
    golferId: id,
    kind: 'takes-part',
    wording: safeguarding,
    givenBy: guardianId,
    now,
  })
  const golfer = await findGolfer(trx, id)
  invariant(golfer, 'the dependant was just written')
  return golfer
}

const bornLater = () => {
  const sentence = 'This day is still to come.'
  // The same fields stand alone in one form and inside another.
  const fields = { bornOn: sentence, 'for.dependant.bornOn': sentence }
  return new Problem('invalid-fields', sentence, fields)
}

export async function recordConsent(
  trx: AcademyTrx,
  consent: {
    golferId: string
    kind: 'takes-part' | 'waiver'
    wording: string
    givenBy: string
    now: Date
  },
): Promise<void> {
  const { now, ...rest } = consent
  await insertConsent(trx, { id: newId(now), ...rest, givenAt: now })
}

export async function addMyDependant(
  services: Services,
  wanted: { academyId: string; person: Person; dependant: Dependant },
): Promise<OwnGolferView> {
  return inAcademy(services.db, wanted.academyId, async (trx) => {
    const { zone } = await readAcademy(trx)
    const { person, dependant } = wanted
    const golfer = await addDependant(services, trx, { guardianId: person.id, dependant })
    return viewOwn(golfer, localDayOf(services.clock.now(), zone))
  })
}

/** A golfer whom the person may act for: themselves or a dependant. Anyone else's is not found. */
export async function findOwnGolfer(
  trx: AcademyTrx,
  { golferId, accountId }: { golferId: string; accountId: string },
): Promise<Golfer> {
  return checkOwnGolfer(await findGolfer(trx, golferId), accountId)
}

/** As `findOwnGolfer`, for one who was read already. */
export function checkOwnGolfer<G extends Pick<Golfer, 'accountId' | 'guardianAccountId'>>(
  golfer: G | null | undefined,
  accountId: string,
): G {
  const isTheirs = golfer?.accountId === accountId || golfer?.guardianAccountId === accountId
  if (!golfer || !isTheirs) throw notFound('golfer')
  return golfer
}

/** Whose golfers a member of staff may see: everybody's, or those of a coach's own sessions. */
export interface Reach {
  academyId: string
  accountId: string
  scope: 'all' | 'own'
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
    return { golfers: rows.map((row) => viewListItem(row, localDayOf(now, zone))) }
  })
}

/** One golfer for staff. Looking at a minor's contacts and consents is written down. */
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
    if (isMinor(row, today)) {
      const seen = { golferId, accountId: reach.accountId, lookedAt: now }
      await insertLookUp(trx, { id: newId(now), ...seen })
    }
    const consents = await listConsents(trx, golferId)
    return {
      ...viewListItem(row, today),
      bornOn: row.bornOn,
      ageYears: row.bornOn ? ageOn(row.bornOn, today) : null,
      notes: row.notes,
      emergencyContact: contactOf(row),
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
    await insertGolfer(trx, {
      id,
      name: wanted.name,
      email: wanted.email ?? null,
      phone: wanted.phone ?? null,
      bornOn: wanted.bornOn ?? null,
      handicap: wanted.handicap ?? null,
      handicapOn: wanted.handicap == null ? null : now.toISOString().slice(0, 10),
      hand: wanted.hand ?? 'right',
      notes: wanted.notes ?? '',
      emergencyName: wanted.emergencyContact?.name ?? null,
      emergencyPhone: wanted.emergencyContact?.phone ?? null,
      createdAt: now,
    })
    const { zone } = await readAcademy(trx)
    const [row] = await searchGolfers(trx, { search: '', now, golferId: id })
    invariant(row, 'the golfer was just written')
    return viewListItem(row, localDayOf(now, zone))
  })
}

export async function changeGolfer(
  { db, clock }: Services,
  wanted: { academyId: string; golferId: string; change: Parsed<'golfers.change', 'body'> },
): Promise<void> {
  const { handicap, ...rest } = wanted.change
  const day = clock.now().toISOString().slice(0, 10)
  const change = { ...rest, ...(handicap === undefined ? {} : { handicap, handicapOn: day }) }
  if (Object.keys(change).length === 0) return
  await inAcademy(db, wanted.academyId, (trx) =>
    updateGolfer(trx, wanted.golferId, change as Partial<Golfer>),
  )
}

async function coachOfReach(
  trx: AcademyTrx,
  { scope, accountId }: Reach,
): Promise<{ coachId?: string } | 'nobody'> {
  if (scope === 'all') return {}
  const coach = await findCoachOf(trx, accountId)
  return coach ? { coachId: coach.id } : 'nobody'
}

function isMinor(golfer: Golfer, today: string): boolean {
  if (golfer.bornOn) return ageOn(golfer.bornOn, today) < ADULT_AGE_YEARS
  return golfer.guardianAccountId !== null
}

function contactOf(golfer: Golfer): { name: string; phone: string } | null {
  if (!golfer.emergencyName || !golfer.emergencyPhone) return null
  return { name: golfer.emergencyName, phone: golfer.emergencyPhone }
}

function viewOwn(golfer: Golfer, today: string): OwnGolferView {
  return {
    id: golfer.id,
    name: golfer.name,
    isMe: golfer.accountId !== null,
    bornOn: golfer.bornOn,
    ageYears: golfer.bornOn ? ageOn(golfer.bornOn, today) : null,
    handicap: golfer.handicap,
    emergencyContact: contactOf(golfer),
  }
}

function viewListItem(row: GolferListRow, today: string): Answer<'golfers.enter'> {
  return {
    id: row.id,
    name: row.name,
    email: row.accountEmail ?? row.email,
    isJunior: isMinor(row, today),
    guardianName: row.guardianName,
    handicap: row.handicap,
    hand: row.hand,
    placesAhead: row.placesAhead,
  }
}

export { findGolfer, findGolferOfAccount, listGolfersOf } from './queries'
export { ageOn, misfitOf, misfitSentence } from './rules'
export type { Golfer } from './models'
