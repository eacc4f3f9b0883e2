import type { Answer } from '@marram/contract'
import type { ShowEnrolments } from '../enrolments/routes'
import { readViews, type OrderInView } from './view-queries'

type Payment = Answer<'enrolments.read'>['payment']

/** Enrolments with their places and with how payment stands. */
export const showEnrolments: ShowEnrolments = async (trx, by) => {
  const rows = await readViews(trx, by)
  return rows.map(({ orders, ...view }) => {
    const order = orders.find(({ state }) => state !== 'void') ?? orders.at(-1)
    return { ...view, payment: paymentOf(order), owedMinor: order?.owedMinor ?? 0 }
  })
}

function paymentOf(order: OrderInView | undefined): Payment {
  if (!order) return 'none'
  if (order.paidMinor > 0 && order.owedMinor === 0) return 'paid'
  if (order.state === 'paid') return 'at-desk'
  if (order.lastRefusal) return 'declined'
  return order.state === 'open' ? 'open' : 'none'
}
