import type { Answer } from '@marram/contract'
import { divideRefund, refundByPolicy, toCurrencyCode, formatMoney } from '@marram/money'
import { readAcademy, type Academy } from '../academies/academies'
import {
  giveUpPlaces,
  listPlaces,
  lockEnrolment,
  lockOwnEnrolment,
  type Enrolment,
} from '../enrolments/enrolments'
import { post } from '../ledger/ledger'
import { givenUp, type GivenUpPlace } from '../ledger/postings'
import { Problem, notFound } from '../platform/errors'
import { newId } from '../platform/ids'
import { localDayOf } from '../platform/local-day'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { sourceOf, type MoneySource } from './called-off'
import { insertRefund, listEnrolmentPlaces } from './queries'
import { policySentence } from './rules'

type Quote = Answer<'checkout.quote-giving-up'>

export interface GivingUp {
  academyId: string
  enrolmentId: string
  /** A golfer gives up what is theirs or their child's; staff give up anybody's. */
  by: { kind: 'golfer'; accountId: string } | { kind: 'staff' }
}

interface Reckoning {
  academy: Academy
  enrolment: Enrolment
  source: MoneySource
  places: (GivenUpPlace & { placeId: string })[]
  paidMinor: number
  backMinor: number
  /** Of what comes back: what was still to be paid at the desk, and is owed no longer. */
  noLongerOwedMinor: number
  bestBasisPoints: number
}

/** What giving up now would bring back, shown before anything is pressed. */
export async function quoteGivingUp({ db, clock }: Services, given: GivingUp): Promise<Quote> {
  return inAcademy(db, given.academyId, async (trx) =>
    toQuote(await reckon(trx, given, clock.now())),
  )
}

function toQuote(reckoning: Reckoning): Quote {
  const { academy, source, places, paidMinor, bestBasisPoints } = reckoning
  const refundMinor = reckoning.backMinor - reckoning.noLongerOwedMinor
  return {
    paidMinor,
    refundMinor,
    refundBasisPoints: bestBasisPoints,
    sentence: policySentence({ tiers: academy.refundTiers, refundBasisPoints: bestBasisPoints }),
    places: places.length,
    comesBackAs: refundMinor === 0 ? 'nothing' : cardOrCash(source),
  }
}

const cardOrCash = ({ from }: MoneySource) => (from === 'provider-clearing' ? 'card' : 'cash')

/** Each place goes by the notice given for its own session. */
async function reckon(trx: AcademyTrx, given: GivingUp, now: Date): Promise<Reckoning> {
  const enrolment = await lockFor(trx, given)
  if (enrolment.state !== 'confirmed') {
    throw new Problem('already-decided', 'This place is not confirmed, or has ended already.')
  }
  const academy = await readAcademy(trx)
  const ahead = (await listEnrolmentPlaces(trx, enrolment.id)).filter(
    ({ state, sessionState, startsAt }) =>
      state === 'confirmed' && sessionState === 'planned' && startsAt > now,
  )
  if (ahead.length === 0) {
    throw new Problem('already-decided', 'Every session of this has begun, or was called off.')
  }
  let bestBasisPoints = 0
  const places = ahead.map((place) => {
    const { refundBasisPoints } = refundByPolicy({
      tiers: academy.refundTiers,
      noticeMilliseconds: place.startsAt.getTime() - now.getTime(),
    })
    bestBasisPoints = Math.max(bestBasisPoints, refundBasisPoints)
    const { netMinor, taxMinor } = place
    return { ...place, ...divideRefund({ netMinor, taxMinor, refundBasisPoints }) }
  })
  const source = await sourceOf(trx, enrolment.id)
  const priceMinor = places.reduce((sum, { netMinor, taxMinor }) => sum + netMinor + taxMinor, 0)
  const backMinor = places.reduce((sum, { back }) => sum + back.grossMinor, 0)
  return {
    academy,
    enrolment,
    source,
    places,
    paidMinor: Math.max(0, priceMinor - source.owedMinor),
    backMinor,
    noLongerOwedMinor: Math.min(source.owedMinor, backMinor),
    bestBasisPoints,
  }
}

async function lockFor(trx: AcademyTrx, given: GivingUp): Promise<Enrolment> {
  const { enrolmentId, by } = given
  if (by.kind === 'golfer') {
    return lockOwnEnrolment(trx, { enrolmentId, accountId: by.accountId })
  }
  const enrolment = await lockEnrolment(trx, enrolmentId)
  if (!enrolment) throw notFound('place')
  return enrolment
}

/**
 * Gives up every place that is still ahead, for the amount that was shown. Throws
 * `changed-meanwhile` when the policy gives another one by now.
 */
export async function giveUp(
  services: Services,
  given: GivingUp & { refundMinor: number },
): Promise<void> {
  await inAcademy(services.db, given.academyId, async (trx) => {
    const now = services.clock.now()
    const reckoning = await reckon(trx, given, now)
    const { academy, enrolment, source } = reckoning
    const { refundMinor } = toQuote(reckoning)
    if (refundMinor !== given.refundMinor) {
      const currency = toCurrencyCode(academy.currency)
      const amount = formatMoney({ amountMinor: refundMinor, currency }, { locale: academy.locale })
      throw new Problem('changed-meanwhile', `You would get ${amount} back now.`)
    }
    const ids = new Set(reckoning.places.map(({ placeId }) => placeId))
    const places = (await listPlaces(trx, enrolment.id)).filter(({ id }) => ids.has(id))
    const { academyId } = academy
    await giveUpPlaces(services, trx, { academyId, enrolment, places })
    const posting = givenUp({
      sourceId: enrolment.id,
      what: given.by.kind === 'golfer' ? 'Given up by the golfer' : 'Given up at the desk',
      happenedOn: localDayOf(now, academy.zone),
      places: reckoning.places,
      from: source.from,
      noLongerOwedMinor: reckoning.noLongerOwedMinor,
    })
    if (enrolment.netMinor + enrolment.taxMinor > 0) {
      await post(services, trx, { posting, currency: academy.currency })
    }
    await askRefund(services, trx, { reckoning, refundMinor, now })
    const event = { academyId, enrolmentId: enrolment.id, refundMinor }
    await services.outbox.emit(trx, 'enrolment.given-up', event)
  })
}

async function askRefund(
  services: Services,
  trx: AcademyTrx,
  given: { reckoning: Reckoning; refundMinor: number; now: Date },
): Promise<void> {
  const { reckoning, refundMinor, now } = given
  const { academy, enrolment, source } = reckoning
  if (refundMinor === 0 || !source.order) return
  const isCard = cardOrCash(source) === 'card'
  const refundId = newId(now)
  const isNew = await insertRefund(trx, {
    id: refundId,
    orderId: source.order.id,
    paymentId: source.paymentId,
    reason: 'given-up',
    sourceId: enrolment.id,
    method: isCard ? 'card' : 'cash',
    amountMinor: refundMinor,
    currency: academy.currency,
    state: isCard ? 'asked' : 'done',
    createdAt: now,
    askedAt: now,
    doneAt: isCard ? null : now,
  })
  const { academyId } = academy
  if (isNew && isCard) await services.outbox.emit(trx, 'refund.asked', { academyId, refundId })
}
