import type { Machine } from '../machine/machine'
import { showAccount, showCheckout } from '../objects/accounts'
import type { View } from '../objects/objects'
import { missing } from '../provider-error'
import { own, ownOf, type Asked } from './asked'
import { requiredAt, textAt, textsAt } from './form-body'
import type { Routes } from './routes'
import { CHECKOUT_PARAMS, readCheckout } from './read-checkout'

const LINK_SECONDS = 300

/** Connected accounts, and the checkouts made for them. */
export function checkoutRoutes(routes: Routes, machine: Machine, view: View): void {
  const { state, now } = machine
  const checkoutOf = (asked: Asked) =>
    own(asked, asked.id, { records: state.checkouts, what: 'checkout.session' })

  routes.post(
    '/v1/accounts',
    ['business_profile', 'controller', 'country', 'email', 'metadata', 'type'],
    ({ form }) =>
      showAccount(
        machine.createAccount({
          email: textAt(form, 'email') ?? '',
          name: textAt(form, 'business_profile', 'name') ?? '',
          metadata: textsAt(form, 'metadata'),
        }),
      ),
  )
  routes.get('/v1/accounts/:id', ({ id }) => {
    const account = state.accounts[id]
    if (!account) throw missing('account', id)
    return showAccount(account)
  })
  routes.post('/v1/account_links', ['account', 'refresh_url', 'return_url', 'type'], ({ form }) => {
    const account = requiredAt(form, 'account')
    if (!state.accounts[account]) throw missing('account', account)
    const query = new URLSearchParams({ return: requiredAt(form, 'return_url') })
    const url = `${view.baseUrl()}/onboarding/${account}?${query.toString()}`
    return { object: 'account_link', created: now(), expires_at: now() + LINK_SECONDS, url }
  })
  routes.post('/v1/checkout/sessions', CHECKOUT_PARAMS, (asked) =>
    showCheckout(machine.createCheckout(readCheckout(asked, now())), view.baseUrl()),
  )
  routes.list('/v1/checkout/sessions', (asked) => ownOf(asked, state.checkouts), {
    payment_intent: ({ payment }, id) => payment === id,
    status: ({ status }, wanted) => status === wanted,
  })
  routes.get('/v1/checkout/sessions/:id', (asked) =>
    showCheckout(checkoutOf(asked), view.baseUrl()),
  )
  routes.post('/v1/checkout/sessions/:id/expire', [], (asked) =>
    showCheckout(machine.expireCheckout(checkoutOf(asked)), view.baseUrl()),
  )
}
