import { allocateByLargestRemainder } from '@marram/money'
import { readAcademy, type Academy } from '../academies/academies'
import { findSession } from '../clinics/clinics'
import {
  endCalledOffPlaces,
  findEnrolment,
  findPlace,
  listEnrolmentsIn,
  listPlaces,
  lockConfirmedPlaces,
  lockEnrolment,
  lockOwnEnrolment,
  lockSeatsOf,
  type Place,
} from '../enrolments/enrolments'
import { offerFreedPlaces } from '../enrolments/waitlist'
import { post, type PlaceAmount } from '../ledger/ledger'
import { calledOffCredit, calledOffMoney } from '../ledger/postings'
import { Problem, notFound } from '../platform/errors'
import { newId } from '../platform/ids'
import { localDayOf } from '../platform/local-day'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import type { Order, OwedPlace } from './models'
import {
  insertCredit,
  insertOwedPlace,
  insertRefund,
  listPaymentsOf,
  lockLiveOrder,
  lockOwedPlace,
  updateOwedPlace,
} from './queries'
import { readOwedAtDesk } from './view-queries'

/** How long a golfer may choose between money and credit. */
export const CHOICE_DAYS = 7

/** A session was called off: every confirmed place in it ends, and what was paid for it is owed. */
export async function owePlacesOfSession(
  services: Services,
  { academyId, sessionId }: { academyId: string; sessionId: string },
): Promise<void> {
  await inAcademy(services.db, academyId, async (trx) => {
    const session = await findSession(trx, sessionId)
    if (session?.state !== 'called-off') return
    const academy = await readAcademy(trx)
    // Enrolments before their places, in one order, as everybody does who ends them.
    for (const id of await listEnrolmentsIn(trx, sessionId)) await lockEnrolment(trx, id)
    await lockSeatsOf(trx, session.clinicId)
    for (const place of await lockConfirmedPlaces(trx, sessionId)) {
      await owe(services, trx, { academy, place })
    }
    // A full session may have been all that kept the rest of the run from those who wait.
    await offerFreedPlaces(services, trx, { academyId, clinicId: session.clinicId })
    await services.outbox.emit(trx, 'session.owed', { academyId, sessionId })
  })
}

/** Places of an enrolment that was only just confirmed, in sessions called off while it was held. */
export async function oweForCalledOff(
  services: Services,
  trx: AcademyTrx,
  { academy, enrolmentId }: { academy: Academy; enrolmentId: string },
): Promise<void> {
  for (const place of await listPlaces(trx, enrolmentId)) {
    if (place.state !== 'confirmed') continue
    const session = await findSession(trx, place.sessionId)
    if (session?.state === 'called-off') await owe(services, trx, { academy, place })
  }
}

async function owe(
  services: Services,
  trx: AcademyTrx,
  { academy, place }: { academy: Academy; place: Place },
): Promise<void> {
  const enrolment = await lockEnrolment(trx, place.enrolmentId)
  if (!enrolment) return
  await endCalledOffPlaces(services, trx, { enrolment, places: [place] })
  const amountMinor = place.netMinor + place.taxMinor
  if (amountMinor === 0) return
  const now = services.clock.now()
  // What was never paid is simply no longer owed, and leaves nothing to choose.
  const { owedMinor } = await sourceOf(trx, enrolment.id)
  const noLongerOwedMinor = Math.min(owedMinor, amountMinor)
  const restMinor = amountMinor - noLongerOwedMinor
  const isSettled = restMinor === 0
  await insertOwedPlace(trx, {
    placeId: place.id,
    amountMinor: isSettled ? amountMinor : restMinor,
    choice: isSettled ? 'money' : null,
    chosenBy: isSettled ? 'default' : null,
    chooseBy: new Date(now.getTime() + CHOICE_DAYS * 86_400_000),
    settledAt: isSettled ? now : null,
  })
  if (noLongerOwedMinor === 0) return
  const amount = await amountOf(trx, place)
  const posting = calledOffMoney({
    sourceId: place.id,
    what: 'Called off, no longer owed',
    happenedOn: localDayOf(now, academy.zone),
    revision: 0,
    place: { ...amount, ...divideOwed(amount, restMinor).unpaid },
    from: 'receivable',
  })
  await post(services, trx, { posting, currency: academy.currency })
}

/** A place's price in two: what was paid and is owed back, and what was never paid. */
function divideOwed({ netMinor, taxMinor }: PlaceAmount, paidMinor: number) {
  const unpaidMinor = netMinor + taxMinor - paidMinor
  const [net = 0, tax = 0] = allocateByLargestRemainder(unpaidMinor, [netMinor, taxMinor])
  return {
    unpaid: { netMinor: net, taxMinor: tax },
    paid: { netMinor: netMinor - net, taxMinor: taxMinor - tax },
  }
}

/** The golfer's choice for a place called off: money back or credit, once. */
export async function chooseForOwedPlace(
  services: Services,
  given: {
    academyId: string
    accountId: string
    placeId: string
    choice: 'credit' | 'money'
  },
): Promise<void> {
  const { accountId, placeId, choice } = given
  await inAcademy(services.db, given.academyId, async (trx) => {
    const place = await findPlace(trx, placeId)
    if (!place) throw notFound('place')
    await lockOwnEnrolment(trx, { enrolmentId: place.enrolmentId, accountId })
    const owed = await lockOwedPlace(trx, placeId)
    if (!owed) throw notFound('place that is owed')
    if (owed.choice === choice) return
    if (owed.choice) {
      throw new Problem('already-decided', `This was settled as ${owed.choice} already.`)
    }
    if (services.clock.now() > owed.chooseBy) {
      throw new Problem('already-decided', 'The seven days to choose are over.')
    }
    await settle(services, trx, { place, owed, choice, chosenBy: 'golfer' })
  })
}

/** Seven days went by without a choice: the academy's default is taken. */
export async function chooseByDefault(
  services: Services,
  { academyId, placeId }: { academyId: string; placeId: string },
): Promise<void> {
  await inAcademy(services.db, academyId, async (trx) => {
    const place = await findPlace(trx, placeId)
    if (!place) return
    await lockEnrolment(trx, place.enrolmentId)
    const owed = await lockOwedPlace(trx, placeId)
    if (!owed || owed.choice || services.clock.now() <= owed.chooseBy) return
    const { owedDefault } = await readAcademy(trx)
    await settle(services, trx, { place, owed, choice: owedDefault, chosenBy: 'default' })
  })
}

async function settle(
  services: Services,
  trx: AcademyTrx,
  given: {
    place: Place
    owed: OwedPlace
    choice: 'credit' | 'money'
    chosenBy: 'golfer' | 'default'
  },
): Promise<void> {
  const { place, owed, choice, chosenBy } = given
  const academy = await readAcademy(trx)
  const now = services.clock.now()
  await updateOwedPlace(trx, place.id, { choice, chosenBy, settledAt: now })
  const price = await amountOf(trx, place)
  const amount = { ...price, ...divideOwed(price, owed.amountMinor).paid }
  if (choice === 'money') {
    const isInPart = owed.amountMinor < price.netMinor + price.taxMinor
    await giveMoneyBack(services, trx, { academy, place, amount, revision: isInPart ? 1 : 0 })
    return
  }
  const posting = calledOffCredit({
    sourceId: place.id,
    what: 'Called off, kept as credit',
    happenedOn: localDayOf(now, academy.zone),
    place: amount,
  })
  await post(services, trx, { posting, currency: academy.currency })
  await insertCredit(trx, {
    id: newId(now),
    golferId: place.golferId,
    amountMinor: owed.amountMinor,
    currency: academy.currency,
    sourceType: 'owed-place',
    sourceId: place.id,
    createdAt: now,
  })
}

export interface MoneySource {
  order: Order | null
  paymentId: string | null
  from: 'provider-clearing' | 'cash-drawer' | 'receivable'
  /** What is still to be paid at the desk. */
  owedMinor: number
}

/** Where an enrolment's money came from, and so where it goes back to. */
export async function sourceOf(trx: AcademyTrx, enrolmentId: string): Promise<MoneySource> {
  const order = (await lockLiveOrder(trx, enrolmentId)) ?? null
  const owedMinor = order?.method === 'desk' ? await readOwedAtDesk(trx, order.id) : 0
  const payments = order ? await listPaymentsOf(trx, order.id) : []
  const card = payments.find(({ method }) => method === 'card')
  if (card) return { order, paymentId: card.id, from: 'provider-clearing', owedMinor }
  const [cash] = payments
  if (cash) return { order, paymentId: cash.id, from: 'cash-drawer', owedMinor }
  return { order, paymentId: null, from: 'receivable', owedMinor }
}

async function giveMoneyBack(
  services: Services,
  trx: AcademyTrx,
  given: { academy: Academy; place: Place; amount: PlaceAmount; revision: 0 | 1 },
): Promise<void> {
  const { academy, place, amount, revision } = given
  const now = services.clock.now()
  const source = await sourceOf(trx, place.enrolmentId)
  const posting = calledOffMoney({
    sourceId: place.id,
    what: 'Called off, money back',
    happenedOn: localDayOf(now, academy.zone),
    revision,
    place: amount,
    from: source.from,
  })
  await post(services, trx, { posting, currency: academy.currency })
  if (!source.order) return
  const refundId = newId(now)
  const isCard = source.from === 'provider-clearing'
  const isNew = await insertRefund(trx, {
    id: refundId,
    orderId: source.order.id,
    paymentId: source.paymentId,
    reason: 'called-off',
    sourceId: place.id,
    method: isCard ? 'card' : 'cash',
    amountMinor: amount.netMinor + amount.taxMinor,
    currency: academy.currency,
    state: isCard ? 'asked' : 'done',
    createdAt: now,
    askedAt: now,
    doneAt: isCard ? null : now,
  })
  const { academyId } = academy
  if (isNew && isCard) await services.outbox.emit(trx, 'refund.asked', { academyId, refundId })
}

async function amountOf(trx: AcademyTrx, place: Place): Promise<PlaceAmount> {
  const session = await findSession(trx, place.sessionId)
  const enrolment = await findEnrolment(trx, place.enrolmentId)
  return {
    clinicId: session?.clinicId ?? enrolment?.clinicId ?? '',
    sessionId: place.sessionId,
    heldOn: session?.heldOn ?? '',
    netMinor: place.netMinor,
    taxMinor: place.taxMinor,
  }
}
