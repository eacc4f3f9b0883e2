import type { Answer } from '@marram/contract'
import type { ShowEnrolments } from '../enrolments/routes'
import { readViews, type OrderInView } from './view-queries'

type Payment = Answer<'enrolments.read'>['payment']

/** Enrolments with their places and with how payment stands. */
export const showEnrolments: ShowEnrolments = async (trx, by) => {
  const rows = await readViews(trx, by)
  return rows.map(({ orders, ...view }) => ({ ...view, payment: paymentOf(orders) }))
}

function paymentOf(orders: readonly OrderInView[]): Payment {
  const order = orders.find(({ state }) => state !== 'void') ?? orders.at(-1)
  if (!order) return 'none'
  if (order.method === 'desk') {
    if (order.owedAtDeskMinor > 0) return 'at-desk'
    return order.paidMinor > 0 ? 'paid' : 'none'
  }
  if (order.paidMinor > 0 && order.paidMinor >= order.totalMinor) return 'paid'
  if (order.lastRefusal) return 'declined'
  return order.state === 'open' ? 'open' : 'none'
}
