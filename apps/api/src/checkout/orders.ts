import { findAccountById } from '../accounts/accounts'
import { readAcademy, type Academy } from '../academies/academies'
import { findClinic } from '../clinics/clinics'
import {
  confirmHold,
  isLapsed,
  lockEnrolment,
  lockOwnEnrolment,
  releaseHold,
  type Enrolment,
} from '../enrolments/enrolments'
import { post } from '../ledger/ledger'
import { paymentAtDesk, saleAtDesk } from '../ledger/postings'
import { Problem, notFound } from '../platform/errors'
import { newId } from '../platform/ids'
import { invariant } from '../platform/invariant'
import { localDayOf } from '../platform/local-day'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { oweForCalledOff } from './called-off'
import type { Order } from './models'
import { findOpenPage, paidMeanwhile } from './open-page'
import type { PaymentsProvider } from './provider'
import {
  insertOrder,
  insertPayment,
  listEnrolmentPlaces,
  lockLiveOrder,
  lockOrder,
  updateOrder,
} from './queries'
import { readOwedAtDesk } from './view-queries'
import { settlePaidCheckout } from './settle'

export interface Own {
  academyId: string
  enrolmentId: string
  accountId: string
}

/** The provider keeps a checkout open for half an hour at least; we end it earlier by a call. */
const CHECKOUT_MINUTES = 31

/**
 * Begins payment of a hold on the provider's own page. Resolves to that page's address; a second
 * press gives the same one while it is open there. Throws `hold-lapsed` and
 * `payments-not-connected`.
 */
export async function startCheckout(
  services: Services,
  provider: PaymentsProvider,
  own: Own,
): Promise<string> {
  const beginOnce = () => inAcademy(services.db, own.academyId, (trx) => begin(services, trx, own))
  let begun = await beginOnce()
  if (begun.order.checkoutUrl) {
    const page = await findOpenPage(services, provider, { ...own, ...begun })
    if (page) return page
    begun = await beginOnce()
  }
  const { order, academy, title, email } = begun
  const { account, amountMinor } = begun
  const back = `${services.config.publicUrl}/${academy.slug}/my/places/${own.enrolmentId}`
  const rate = services.config.payments.platformFeeBasisPoints
  const checkout = await provider.createCheckout({
    account,
    orderId: order.id,
    attempt: order.attempt,
    academyId: own.academyId,
    enrolmentId: own.enrolmentId,
    title,
    amountMinor,
    currency: order.currency,
    applicationFeeMinor: Math.floor((amountMinor * rate) / 10_000),
    email,
    successUrl: `${back}?from=payment`,
    cancelUrl: `${back}?from=turning-back`,
    expiresAt: new Date(services.clock.now().getTime() + CHECKOUT_MINUTES * 60_000),
  })
  const page = await inAcademy(services.db, own.academyId, async (trx) => {
    const now = await lockOrder(trx, order.id)
    if (now?.state !== 'open') return null
    // Of two presses at once each made a page: the one that was kept first takes the money.
    if (now.checkoutUrl) return now.checkoutUrl
    await updateOrder(trx, order.id, { checkoutId: checkout.id, checkoutUrl: checkout.url })
    return checkout.url
  })
  if (page !== checkout.url) await provider.expireCheckout(account, checkout.id)
  if (!page) throw holdLapsed()
  return page
}

async function begin(services: Services, trx: AcademyTrx, own: Own) {
  const enrolment = await lockOwnEnrolment(trx, own)
  const now = services.clock.now()
  checkIsHeld(enrolment, now)
  const academy = await readAcademy(trx)
  if (academy.paymentsState !== 'ready' || !academy.paymentsAccount) {
    throw new Problem('payments-not-connected', 'This academy takes no card payments yet.')
  }
  if (enrolment.payMode !== 'card') {
    throw new Problem('not-on-sale', 'This place is paid at the desk.')
  }
  const had = await lockLiveOrder(trx, enrolment.id)
  const order = had ?? (await openOrder(trx, { enrolment, method: 'card', now, state: 'open' }))
  if (!order.checkoutUrl) {
    await updateOrder(trx, order.id, { attempt: order.attempt + 1 })
    order.attempt += 1
  }
  const clinic = await findClinic(trx, enrolment.clinicId)
  const account = await findAccountById(trx, own.accountId)
  return {
    order,
    academy,
    account: academy.paymentsAccount,
    amountMinor: enrolment.netMinor + enrolment.taxMinor,
    title: clinic?.title ?? 'Clinic',
    email: account?.email ?? null,
  }
}

function checkIsHeld(enrolment: Enrolment, now: Date): void {
  if (enrolment.state === 'confirmed') {
    throw new Problem('already-decided', 'This place is confirmed already.')
  }
  const isHeld = enrolment.state === 'held' && enrolment.heldUntil
  if (!isHeld || isLapsed(enrolment.heldUntil ?? now, now)) throw holdLapsed()
}

const holdLapsed = () =>
  new Problem('hold-lapsed', 'The time to pay ran out, and the place was let go.')

async function openOrder(
  trx: AcademyTrx,
  given: { enrolment: Enrolment; method: Order['method']; state: Order['state']; now: Date },
): Promise<Order> {
  const { enrolment, method, state, now } = given
  return insertOrder(trx, {
    id: newId(now),
    enrolmentId: enrolment.id,
    accountId: enrolment.takenBy,
    state,
    method,
    currency: enrolment.currency,
    netMinor: enrolment.netMinor,
    taxMinor: enrolment.taxMinor,
    attempt: 0,
    checkoutId: null,
    checkoutUrl: null,
    createdAt: now,
    paidAt: state === 'paid' ? now : null,
  })
}

/** Takes a held place with the promise to pay at the desk. */
export async function payAtDesk(
  services: Services,
  provider: PaymentsProvider,
  own: Own,
): Promise<void> {
  await endOpenCheckout(services, provider, own)
  await inAcademy(services.db, own.academyId, async (trx) => {
    const enrolment = await lockOwnEnrolment(trx, own)
    checkIsHeld(enrolment, services.clock.now())
    const academy = await readAcademy(trx)
    if (!academy.canPayAtDesk && enrolment.payMode !== 'desk') {
      throw new Problem('not-on-sale', 'This academy takes payment by card only.')
    }
    await promiseAtDesk(services, trx, { academy, enrolment })
  })
}

/** Confirms a hold against a promise: the golfer owes the price until it is taken at the desk. */
export async function promiseAtDesk(
  services: Services,
  trx: AcademyTrx,
  { academy, enrolment }: { academy: Academy; enrolment: Enrolment },
): Promise<void> {
  const now = services.clock.now()
  const { academyId } = academy
  const enrolmentId = enrolment.id
  const had = await lockLiveOrder(trx, enrolmentId)
  if (had) await updateOrder(trx, had.id, { state: 'void' })
  const outcome = await confirmHold(services, trx, { academyId, enrolmentId })
  // A place that costs nothing was confirmed when it was taken, and asks for no order.
  if (outcome !== 'confirmed') return
  const order = await openOrder(trx, { enrolment, method: 'desk', state: 'paid', now })
  const clinic = await findClinic(trx, enrolment.clinicId)
  const posting = saleAtDesk({
    sourceId: order.id,
    what: `${clinic?.title ?? 'Clinic'}, to be paid at the desk`,
    happenedOn: localDayOf(now, academy.zone),
    places: await listEnrolmentPlaces(trx, enrolmentId),
  })
  await post(services, trx, { posting, currency: order.currency })
  await oweForCalledOff(services, trx, { academy, enrolmentId })
}

/** Staff take cash: all that is owed, or a part of it. Throws `invalid-fields` for more than that. */
export async function takeCash(
  services: Services,
  given: { academyId: string; enrolmentId: string; amountMinor: number; takenBy: string },
): Promise<void> {
  await inAcademy(services.db, given.academyId, async (trx) => {
    if (!(await lockEnrolment(trx, given.enrolmentId))) throw notFound('place')
    const order = await lockLiveOrder(trx, given.enrolmentId)
    if (order?.method !== 'desk') {
      throw new Problem('already-decided', 'Nothing is owed at the desk for this place.')
    }
    const owedMinor = await readOwedAtDesk(trx, order.id)
    if (given.amountMinor === 0 || given.amountMinor > owedMinor) {
      const sentence =
        owedMinor === 0 ? 'Nothing is owed for this place.' : 'That is not an amount that is owed.'
      throw new Problem('invalid-fields', sentence, { amountMinor: sentence })
    }
    const now = services.clock.now()
    const { zone } = await readAcademy(trx)
    const id = newId(now)
    await insertPayment(trx, {
      id,
      orderId: order.id,
      method: 'cash',
      amountMinor: given.amountMinor,
      currency: order.currency,
      takenBy: given.takenBy,
      takenAt: now,
    })
    const posting = paymentAtDesk({
      sourceId: id,
      what: 'Cash taken at the desk',
      happenedOn: localDayOf(now, zone),
      amountMinor: given.amountMinor,
      into: 'cash-drawer',
    })
    await post(services, trx, { posting, currency: order.currency })
  })
}

/** Lets a hold go before it is paid. */
export async function letGo(
  services: Services,
  provider: PaymentsProvider,
  own: Own,
): Promise<void> {
  await endOpenCheckout(services, provider, own)
  await inAcademy(services.db, own.academyId, async (trx) => {
    const { id: enrolmentId } = await lockOwnEnrolment(trx, own)
    await voidAndRelease(services, trx, { ...own, enrolmentId, because: 'let-go' })
  })
}

/**
 * A hold whose time has run out: the provider is asked to end the checkout. Ended, the places are
 * released; paid already, they are confirmed; no answer, the place is kept and asked for again.
 */
export async function lapseHold(
  services: Services,
  provider: PaymentsProvider,
  { academyId, enrolmentId }: { academyId: string; enrolmentId: string },
): Promise<void> {
  const due = await inAcademy(services.db, academyId, async (trx) => {
    const enrolment = await lockEnrolment(trx, enrolmentId)
    const now = services.clock.now()
    return enrolment?.state === 'held' && isLapsed(enrolment.heldUntil ?? now, now)
  })
  if (!due) return
  const ended = await endCheckout(services, provider, { academyId, enrolmentId })
  if (ended === 'paid') return
  await inAcademy(services.db, academyId, (trx) =>
    voidAndRelease(services, trx, { academyId, enrolmentId, because: 'lapsed' }),
  )
}

async function voidAndRelease(
  services: Services,
  trx: AcademyTrx,
  given: { academyId: string; enrolmentId: string; because: 'lapsed' | 'let-go' },
): Promise<void> {
  const isReleased = await releaseHold(services, trx, given)
  if (!isReleased) return
  const order = await lockLiveOrder(trx, given.enrolmentId)
  if (order) await updateOrder(trx, order.id, { state: 'void' })
}

async function endOpenCheckout(
  services: Services,
  provider: PaymentsProvider,
  own: Own,
): Promise<void> {
  await inAcademy(services.db, own.academyId, (trx) => lockOwnEnrolment(trx, own))
  const ended = await endCheckout(services, provider, own)
  if (ended === 'paid') throw paidMeanwhile()
}

/** Ends the checkout of an enrolment's open order, if it has one. A paid one is settled. */
async function endCheckout(
  services: Services,
  provider: PaymentsProvider,
  { academyId, enrolmentId }: { academyId: string; enrolmentId: string },
): Promise<'none' | 'ended' | 'paid'> {
  const { order, account } = await inAcademy(services.db, academyId, async (trx) => ({
    order: await lockLiveOrder(trx, enrolmentId),
    account: (await readAcademy(trx)).paymentsAccount,
  }))
  if (order?.state !== 'open' || !order.checkoutId) return 'none'
  invariant(account, 'an academy with a checkout has a payments account')
  const checkout = await provider.expireCheckout(account, order.checkoutId)
  if (checkout.state === 'expired') return 'ended'
  if (checkout.state === 'open') {
    throw new Problem('provider-unavailable', 'The payment page could not be closed just now.')
  }
  await settlePaidCheckout(services, provider, { academyId, account, checkout })
  return 'paid'
}
