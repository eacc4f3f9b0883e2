import { makeStripeProvider } from '../../../apps/api/src/checkout/stripe-provider'
import { asSuperuser } from '../../support/books'
import {
  openAcademy,
  signUp,
  takePlace,
  type EnrolmentView,
  type OpenAcademy,
  type SignedUp,
} from '../../support/builders'
import type { World } from '../../support/world'

/** A run for 240.00, tax in it, held by a golfer who has not paid yet. */
export interface Hold {
  academy: OpenAcademy
  golfer: SignedUp
  held: EnrolmentView
  params: { academy: string; enrolmentId: string }
}

export async function holdRun(
  world: World,
  given: { academy?: OpenAcademy; capacity?: number } = {},
): Promise<Hold> {
  const academy =
    given.academy ?? (await openAcademy(world, { clinic: { capacity: given.capacity ?? 12 } }))
  const golfer = await signUp(world)
  const held = await takePlace(golfer, academy, { clinic: academy.clinic })
  const params = { academy: academy.slug, enrolmentId: held.id }
  return { academy, golfer, held, params }
}

/** Presses Pay; gives the checkout that the provider's page is for. */
export async function startPaying({ golfer, params }: Hold): Promise<string> {
  const { url } = await golfer.person.must('checkout.start', { params })
  return checkoutOf(url)
}

export const checkoutOf = (url: string): string => new URL(url).pathname.split('/').at(-1) ?? ''

export const readEnrolment = ({ golfer, params }: Hold): Promise<EnrolmentView> =>
  golfer.person.must('enrolments.read', { params })

/** One millisecond past the last at which the hold stands. */
export const justAfter = ({ held }: Hold): Date => new Date(Date.parse(held.heldUntil ?? '') + 1)

/**
 * A payment page of this order that we know nothing of, as one that was left open in another
 * window: it takes money when its place has long gone.
 */
export async function openStrayPage(world: World, { academy, held }: Hold): Promise<string> {
  const { orderId, account } = await asSuperuser(world, async (db) => {
    const { rows } = await db.raw<{ rows: { orderId: string; account: string }[] }>(
      `SELECT o.id AS order_id, a.payments_account AS account FROM orders o
       JOIN academies a USING (academy_id) WHERE o.enrolment_id = ?`,
      [held.id],
    )
    const [row] = rows
    if (!row) throw new Error('payment of this hold was never begun')
    return row
  })
  const { id } = await makeStripeProvider(world.services.config.payments).createCheckout({
    account,
    orderId,
    attempt: 99,
    academyId: '',
    enrolmentId: held.id,
    title: academy.clinic.title,
    amountMinor: held.totalMinor,
    currency: 'EUR',
    applicationFeeMinor: 240,
    email: null,
    successUrl: world.url,
    cancelUrl: world.url,
    expiresAt: new Date(world.clock.now().getTime() + 60 * 60_000),
  })
  return id
}
