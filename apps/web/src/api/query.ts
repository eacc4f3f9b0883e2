import type { Answer } from '@marram/contract'
import type { RouteKey } from '@marram/contract/routes'
import { queryOptions } from '@tanstack/react-query'
import { addressOf, call, type CallInput } from './client'
import { takePageData } from './page-data'

/**
 * The query of a GET route. Its key begins with the academy and the route, so that a change can make
 * every answer of a route, or of an academy, be asked for again.
 */
export function routeQuery<K extends RouteKey>(key: K, input: CallInput<K>) {
  // Each route has its own shape; its address takes only what all shapes share.
  const loose = input as Parameters<typeof addressOf>[1]
  const address = addressOf(key, loose)
  return queryOptions({
    queryKey: [loose.academy ?? '', key, address],
    queryFn: ({ signal }) => call(key, { ...input, signal }),
    // What came inside the page's HTML was true a moment ago; the server wrote there what the route
    // answers at this address, so it is of the route's type.
    initialData: () => takePageData(address) as Answer<K> | undefined,
  })
}
