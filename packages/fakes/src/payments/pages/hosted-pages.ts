import { Router, urlencoded, type Response } from 'express'
import { escapeHtml, page } from '../../page'
import type { Machine } from '../machine/machine'
import { indexPage } from './index-page'
import { NOTE, payPage } from './pay-page'

/** The provider's own pages: paying, connecting an account, and a look at what is there. */
export function hostedPages(machine: Machine, onChange: () => void): Router {
  const router = Router()
  const { state } = machine
  // For these pages only: the API reads its bodies itself, and a body can be read once.
  const readForm = urlencoded({ extended: false })

  router.get('/pay/:id', (request, response) => {
    machine.tick()
    const checkout = state.checkouts[request.params.id]
    if (!checkout) return sendNotFound(response)
    response.send(payPage(checkout))
  })
  router.post('/pay/:id', readForm, (request, response) => {
    machine.tick()
    const checkout = state.checkouts[request.params.id]
    if (!checkout) return sendNotFound(response)
    const { card = '' } = request.body as Record<string, string>
    const refusal = machine.pay(checkout, { card })
    onChange()
    if (refusal) return void response.status(402).send(payPage(checkout, refusal))
    response.redirect(303, checkout.successUrl.replace('{CHECKOUT_SESSION_ID}', checkout.id))
  })
  router.get('/onboarding/:account', (request, response) => {
    const account = state.accounts[request.params.account]
    if (!account) return sendNotFound(response)
    response.send(
      page(
        'Connect an account',
        `<h1>Connect ${escapeHtml(account.name)}</h1>${NOTE}
         <p>A real provider asks here for the business, its owners and its bank account.</p>
         <form method="post"><button type="submit">Done</button></form>`,
      ),
    )
  })
  router.post('/onboarding/:account', (request, response) => {
    const { account } = request.params
    if (!state.accounts[account]) return sendNotFound(response)
    machine.finishOnboarding(account)
    onChange()
    const { return: back } = request.query
    response.redirect(303, typeof back === 'string' ? back : '/')
  })
  router.get('/', (_request, response) => response.send(indexPage(state)))
  return router
}

function sendNotFound(response: Response): void {
  response.status(404).send(page('Not here', `<h1>This page is not here</h1>${NOTE}`))
}
