import type { Answer, Parsed } from '@marram/contract'
import { Problem } from '../platform/errors'
import { newId } from '../platform/ids'
import type { Services } from '../platform/services'
import { findAcademyBySlug } from '../platform/tenancy/look-ups'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import {
  DEFAULT_ACCENT,
  DEFAULT_REFUND_TIERS,
  DEFAULT_SAFEGUARDING,
  DEFAULT_WAIVER,
  HOLD_MINUTES,
  OFFER_HOURS,
  startingSettings,
} from './defaults'
import type { Academy } from './models'
import { addRole, insertAcademy, readAcademy, updateAcademy } from './queries'
import { isReservedSlug, sortTiers, toSlug } from './rules'

type AcademyView = Answer<'academies.read'>

/** Opens an academy with sensible settings; whoever opens it is its owner. */
export async function openAcademy(
  { db, clock }: Services,
  { accountId, wanted }: { accountId: string; wanted: Parsed<'academies.open', 'body'> },
): Promise<AcademyView> {
  if (isReservedSlug(wanted.slug)) throw slugTaken(wanted.slug)
  const now = clock.now()
  const academyId = newId(now)
  const starting = startingSettings(wanted.currency)
  return inAcademy(db, academyId, async (trx) => {
    const isMine = await insertAcademy(trx, {
      name: wanted.name,
      place: wanted.place,
      slug: wanted.slug,
      zone: wanted.zone,
      currency: wanted.currency,
      locale: starting.locale,
      taxMode: wanted.taxMode,
      taxName: wanted.taxName ?? starting.taxName,
      taxBasisPoints: wanted.taxBasisPoints ?? starting.taxBasisPoints,
      refundTiers: DEFAULT_REFUND_TIERS,
      waiver: DEFAULT_WAIVER,
      safeguarding: DEFAULT_SAFEGUARDING,
      holdMinutes: HOLD_MINUTES,
      offerHours: OFFER_HOURS,
      duskKind: 'sunset',
      owedDefault: 'credit',
      canPayAtDesk: true,
      ...DEFAULT_ACCENT,
      createdAt: now,
    })
    if (!isMine) throw slugTaken(wanted.slug)
    await addRole(trx, { accountId, role: 'owner', createdAt: now })
    return viewAcademy(await readAcademy(trx))
  })
}

const slugTaken = (slug: string) =>
  new Problem('already-there', `The address /${slug} is taken.`, {
    slug: 'Another academy has this address. Try adding the place.',
  })

/** Says whether an address is free, and suggests one that is written as we write them. */
export async function checkSlug(
  { db }: Services,
  text: string,
): Promise<Answer<'academies.check-slug'>> {
  const suggestion = toSlug(text)
  const isFree =
    suggestion.length >= 2 &&
    !isReservedSlug(suggestion) &&
    (await findAcademyBySlug(db, suggestion)) === null
  return { isFree, suggestion }
}

export async function readSettings({ db }: Services, academyId: string): Promise<AcademyView> {
  return inAcademy(db, academyId, async (trx) => viewAcademy(await readAcademy(trx)))
}

export async function changeSettings(
  { db }: Services,
  { academyId, change }: { academyId: string; change: Parsed<'academies.change', 'body'> },
): Promise<AcademyView> {
  const { refundTiers, ...rest } = change
  const patch: Record<string, unknown> = { ...rest }
  if (refundTiers) patch['refundTiers'] = sortTiers(refundTiers)
  return inAcademy(db, academyId, async (trx) => {
    if (Object.keys(patch).length === 0) return viewAcademy(await readAcademy(trx))
    return viewAcademy(await updateAcademy(trx, patch))
  })
}

/** Puts the public page up or takes it down. */
export async function publishAcademy(
  { db, clock }: Services,
  { academyId, isPublished }: { academyId: string; isPublished: boolean },
): Promise<AcademyView> {
  return inAcademy(db, academyId, async (trx) => {
    const { publishedAt } = await readAcademy(trx)
    const kept = publishedAt ?? clock.now()
    return viewAcademy(await updateAcademy(trx, { publishedAt: isPublished ? kept : null }))
  })
}

/** Makes sure that a person who takes a place here has the golfer's role. */
export async function joinAsGolfer(
  trx: AcademyTrx,
  { accountId, now }: { accountId: string; now: Date },
): Promise<void> {
  await addRole(trx, { accountId, role: 'golfer', createdAt: now })
}

export function viewAcademy(academy: Academy): AcademyView {
  // What the contract names is what an academy is; the columns it does not name stay here.
  const {
    academyId: _,
    paymentsAccount: __,
    createdAt: ___,
    publishedAt,
    ...shown
  } = academy.toJSON()
  return {
    ...(shown as unknown as AcademyView),
    publishedAt: publishedAt ? new Date(publishedAt).toISOString() : null,
  }
}

export { readAcademy, updateAcademy, addRole } from './queries'
export type { Academy, RefundTier } from './models'
