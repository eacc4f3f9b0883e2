import type { Answer, Parsed } from '@marram/contract'
import { readAcademy } from '../academies/academies'
import { Problem, notFound } from '../platform/errors'
import { newId } from '../platform/ids'
import { invariant } from '../platform/invariant'
import type { Services } from '../platform/services'
import { localDayOf } from '../platform/local-day'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { datedHandicap } from './handicap'
import type { Golfer } from './models'
import {
  findDependant,
  findGolfer,
  findGolferOfAccount,
  findUnclaimedGolfer,
  insertConsent,
  insertGolfer,
  listGolfersOf,
  lockGuardian,
  updateGolfer,
} from './queries'
import { ageOn, contactOf } from './rules'

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
    await updateGolfer(trx, golfer.id, await datedHandicap(trx, { handicap, now }))
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
  await lockGuardian(trx, guardianId)
  const had = await findDependant(trx, { guardianAccountId: guardianId, name, bornOn })
  if (had) return had
  const { safeguarding } = await readAcademy(trx)
  await refuseBornLater(trx, { bornOn, now })
  const id = newId(now)
  await insertGolfer(trx, {
    id,
    guardianAccountId: guardianId,
    name,
    bornOn,
    ...(await datedHandicap(trx, { handicap: dependant.handicap, now })),
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

/** Nobody was born on a day that is still to come. Throws `invalid-fields`. */
export async function refuseBornLater(
  trx: AcademyTrx,
  { bornOn, now }: { bornOn: string | null | undefined; now: Date },
): Promise<void> {
  if (!bornOn || bornOn <= localDayOf(now, (await readAcademy(trx)).zone)) return
  const sentence = 'This day is still to come.'
  // The same fields stand alone in one form and inside another.
  const fields = { bornOn: sentence, 'for.dependant.bornOn': sentence }
  throw new Problem('invalid-fields', sentence, fields)
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
  if (!golfer || !isOwnGolfer(golfer, accountId)) throw notFound('golfer')
  return golfer
}

/** Whether a golfer is the person themselves or a dependant of theirs. */
export function isOwnGolfer(
  golfer: Pick<Golfer, 'accountId' | 'guardianAccountId'>,
  accountId: string,
): boolean {
  return golfer.accountId === accountId || golfer.guardianAccountId === accountId
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

export { findGolfer, findGolferOfAccount, listGolfersOf } from './queries'
export { isMinor, misfitOf, misfitSentence } from './rules'
export type { Golfer } from './models'
