import type { Router } from 'express'
import type { Machine } from '../machine/machine'
import { showEvent } from '../objects/objects'
import { ProviderError, missing } from '../provider-error'
import { checkoutRoutes } from './checkout-routes'
import { balanceRoutes, disputeRoutes, paymentRoutes } from './money-routes'
import { makeRoutes, sendError, type ApiOptions } from './routes'

/** The provider's API, as far as Marram speaks it. */
export function paymentsApi(machine: Machine, options: ApiOptions): Router {
  const { view } = options
  const { router, routes } = makeRoutes(machine, options)
  checkoutRoutes(routes, machine, view)
  paymentRoutes(routes, machine)
  disputeRoutes(routes, machine)
  balanceRoutes(routes, machine)

  routes.list(
    '/v1/events',
    ({ account }) => machine.state.events.filter((event) => event.account === account),
    { type: (event, type) => event.type === type },
  )
  routes.get('/v1/events/:id', ({ account, id }) => {
    const event = machine.state.events.find((one) => one.id === id && one.account === account)
    if (!event) throw missing('event', id)
    return showEvent(event, view)
  })
  router.use('/v1', (request, response) =>
    sendError(
      response,
      new ProviderError(404, `Unrecognized request URL (${request.method}: ${request.path}).`),
    ),
  )
  return router
}
