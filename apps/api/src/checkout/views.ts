import type { Answer } from '@marram/contract'
import { listEnrolments, listPlaceRows, type PlaceRow } from '../enrolments/enrolments'
import type { ShowEnrolments } from '../enrolments/routes'
import type { Order, OwedPlace, Payment } from './models'
import { listOrdersOf, listOwedPlaces, listPaymentsOf } from './queries'

type EnrolmentView = Answer<'enrolments.read'>

/** Enrolments with their places and with how payment stands. */
export const showEnrolments: ShowEnrolments = async (trx, by) => {
  const enrolments = await listEnrolments(trx, by)
  const ids = enrolments.map(({ id }) => id)
  const places = await listPlaceRows(trx, ids)
  const orders = await listOrdersOf(trx, ids)
  const payments = await listPaymentsOf(
    trx,
    orders.map(({ id }) => id),
  )
  const owed = await listOwedPlaces(
    trx,
    places.map(({ id }) => id),
  )
  const owedByPlace = new Map(owed.map((row) => [row.placeId, row]))

  return enrolments.map((enrolment): EnrolmentView => ({
    id: enrolment.id,
    kind: enrolment.kind,
    state: enrolment.state,
    endedBecause: enrolment.endedBecause,
    isOffer: enrolment.isOffer,
    heldUntil: enrolment.heldUntil?.toISOString() ?? null,
    clinic: {
      id: enrolment.clinicId,
      slug: enrolment.clinicSlug,
      title: enrolment.clinicTitle,
      zone: enrolment.zone,
      bring: enrolment.clinicBring,
      venueName: enrolment.venueName,
    },
    golfer: {
      id: enrolment.golferId,
      name: enrolment.golferName,
      isMe: enrolment.golferAccountId !== null,
    },
    netMinor: enrolment.netMinor,
    taxMinor: enrolment.taxMinor,
    totalMinor: enrolment.netMinor + enrolment.taxMinor,
    payMode: enrolment.payMode,
    payment: paymentOf(
      orders.filter((order) => order.enrolmentId === enrolment.id),
      payments,
    ),
    places: places
      .filter(({ enrolmentId }) => enrolmentId === enrolment.id)
      .map((place) => viewPlace(place, owedByPlace.get(place.id))),
  }))
}

function paymentOf(
  orders: readonly Order[],
  payments: readonly Payment[],
): EnrolmentView['payment'] {
  const order = orders.find(({ state }) => state !== 'void') ?? orders.at(-1)
  if (!order) return 'none'
  const paidMinor = payments
    .filter(({ orderId }) => orderId === order.id)
    .reduce((sum, { amountMinor }) => sum + amountMinor, 0)
  if (paidMinor > 0 && paidMinor >= order.netMinor + order.taxMinor) return 'paid'
  if (order.state === 'paid') return 'at-desk'
  if (order.lastRefusal) return 'declined'
  return order.state === 'open' ? 'open' : 'none'
}

function viewPlace(place: PlaceRow, owed: OwedPlace | undefined): EnrolmentView['places'][number] {
  return {
    id: place.id,
    sessionId: place.sessionId,
    number: place.number,
    startsAt: place.startsAt.toISOString(),
    endsAt: place.endsAt.toISOString(),
    state: place.state,
    isCalledOff: place.sessionState === 'called-off',
    owed: owed
      ? {
          amountMinor: owed.amountMinor,
          choice: owed.choice,
          chooseBy: owed.chooseBy.toISOString(),
          isSettled: owed.settledAt !== null,
        }
      : null,
    mark: place.mark,
    areas: place.areas,
  }
}
