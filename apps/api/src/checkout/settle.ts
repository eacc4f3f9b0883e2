import { readAcademy, type Academy } from '../academies/academies'
import { findClinic } from '../clinics/clinics'
import { confirmHold, findEnrolment, lockEnrolment, retakeLapsed } from '../enrolments/enrolments'
import { post } from '../ledger/ledger'
import { fees, saleByCard, unplacedPayment } from '../ledger/postings'
import { newId } from '../platform/ids'
import { localDayOf } from '../platform/local-day'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { oweForCalledOff } from './called-off'
import type { Order } from './models'
import type { Checkout, PaymentsProvider, ProviderPayment } from './provider'
import {
  findOrder,
  insertPayment,
  insertRefund,
  listEnrolmentPlaces,
  lockOrder,
  updateOrder,
} from './queries'

/**
 * A checkout was paid: the hold is confirmed and the sale posted, once, however often and in
 * whatever order we are told. A payment whose place has gone takes it again where it can, and is
 * given back by itself where it cannot.
 */
export async function settlePaidCheckout(
  services: Services,
  provider: PaymentsProvider,
  given: { academyId: string; account: string; checkout: Checkout },
): Promise<void> {
  const { academyId, account, checkout } = given
  if (checkout.state !== 'paid' || !checkout.payment || !checkout.orderId) return
  const { orderId } = checkout
  const payment = await provider.readPayment(account, checkout.payment)
  if (!payment.isSucceeded) return
  await inAcademy(services.db, academyId, async (trx) => {
    const order = await lockWithEnrolment(trx, orderId)
    if (!order) return
    const now = services.clock.now()
    const paymentId = newId(now)
    const isNew = await insertPayment(trx, {
      id: paymentId,
      orderId,
      method: 'card',
      amountMinor: payment.amountMinor,
      currency: order.currency,
      providerPayment: payment.id,
      providerFeeMinor: payment.providerFeeMinor,
      platformFeeMinor: payment.platformFeeMinor,
      takenBy: null,
      takenAt: now,
    })
    if (!isNew) return
    const academy = await readAcademy(trx)
    await place(services, trx, { academy, order, payment, paymentId })
  })
}

/** Locks an order behind its enrolment, as everybody does who changes both. */
async function lockWithEnrolment(trx: AcademyTrx, orderId: string): Promise<Order | undefined> {
  const order = await findOrder(trx, orderId)
  if (!order) return undefined
  await lockEnrolment(trx, order.enrolmentId)
  return lockOrder(trx, orderId)
}

interface Paid {
  academy: Academy
  order: Order
  payment: ProviderPayment
  paymentId: string
}

async function place(services: Services, trx: AcademyTrx, paid: Paid): Promise<void> {
  const { academy, order, payment, paymentId } = paid
  const { academyId } = academy
  const { enrolmentId } = order
  const now = services.clock.now()
  const happenedOn = localDayOf(now, academy.zone)
  const outcome = await confirmHold(services, trx, { academyId, enrolmentId })
  const isPlaced =
    outcome === 'confirmed' ||
    (outcome === 'gone' && (await retakeLapsed(services, trx, { academyId, enrolmentId })))
  const about = { what: await titleOf(trx, enrolmentId), happenedOn }
  const currency = order.currency
  if (isPlaced) {
    await updateOrder(trx, order.id, { state: 'paid', paidAt: now, lastRefusal: null })
    const places = await listEnrolmentPlaces(trx, enrolmentId)
    await post(services, trx, {
      posting: saleByCard({ ...about, sourceId: order.id, places }),
      currency,
    })
  } else {
    await post(services, trx, {
      posting: unplacedPayment({
        sourceId: paymentId,
        what: `${about.what}: paid after the place had gone`,
        happenedOn,
        amountMinor: payment.amountMinor,
      }),
      currency,
    })
    await giveBack(services, trx, paid)
  }
  const { providerFeeMinor, platformFeeMinor } = payment
  const posting = fees({
    sourceId: paymentId,
    what: `Fees of a card payment, ${about.what}`,
    happenedOn,
    providerFeeMinor,
    platformFeeMinor,
  })
  await post(services, trx, { posting, currency })
  if (isPlaced) await oweForCalledOff(services, trx, { academy, enrolmentId })
}

async function titleOf(trx: AcademyTrx, enrolmentId: string): Promise<string> {
  const enrolment = await findEnrolment(trx, enrolmentId)
  const clinic = enrolment && (await findClinic(trx, enrolment.clinicId))
  return clinic?.title ?? 'Clinic'
}

async function giveBack(services: Services, trx: AcademyTrx, paid: Paid): Promise<void> {
  const { academy, order, payment, paymentId } = paid
  const now = services.clock.now()
  const refundId = newId(now)
  await insertRefund(trx, {
    id: refundId,
    orderId: order.id,
    paymentId,
    reason: 'late-payment',
    sourceId: paymentId,
    method: 'card',
    amountMinor: payment.amountMinor,
    currency: order.currency,
    state: 'asked',
    createdAt: now,
    askedAt: now,
  })
  const { academyId } = academy
  await services.outbox.emit(trx, 'refund.asked', { academyId, refundId })
}

/** A try at paying was refused: the place stays held, and the golfer is told why. */
export async function noteRefusal(
  { db }: Services,
  { academyId, payment }: { academyId: string; payment: ProviderPayment },
): Promise<void> {
  const { orderId, refusal } = payment
  if (payment.isSucceeded || !orderId || !refusal) return
  await inAcademy(db, academyId, async (trx) => {
    const order = await lockOrder(trx, orderId)
    // A refusal that arrives after the payment itself says nothing any more.
    if (order?.state === 'open') await updateOrder(trx, orderId, { lastRefusal: refusal })
  })
}
