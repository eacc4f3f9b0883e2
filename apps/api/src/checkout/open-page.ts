import { Problem } from '../platform/errors'
import type { Services } from '../platform/services'
import { inAcademy } from '../platform/tenancy/transaction'
import type { Order } from './models'
import type { PaymentsProvider } from './provider'
import { lockOrder, updateOrder } from './queries'
import { settlePaidCheckout } from './settle'

/**
 * The page on which payment of an order was begun earlier, while the provider keeps it open. A long
 * hold or an offer outlives that page: then it is forgotten, null is the answer, and another can be
 * begun. Throws `already-decided` when it was paid meanwhile.
 */
export async function findOpenPage(
  services: Services,
  provider: PaymentsProvider,
  { academyId, account, order }: { academyId: string; account: string; order: Order },
): Promise<string | null> {
  const { id, checkoutId, checkoutUrl } = order
  if (!checkoutId || !checkoutUrl) return null
  const checkout = await provider.readCheckout(account, checkoutId)
  if (checkout.state === 'open') return checkoutUrl
  if (checkout.state === 'paid') {
    await settlePaidCheckout(services, provider, { academyId, account, checkout })
    throw paidMeanwhile()
  }
  await inAcademy(services.db, academyId, async (trx) => {
    const now = await lockOrder(trx, id)
    if (now?.checkoutId === checkoutId) {
      await updateOrder(trx, id, { checkoutId: null, checkoutUrl: null })
    }
  })
  return null
}

export const paidMeanwhile = () =>
  new Problem('already-decided', 'Your payment has just come in: the place is yours.')
