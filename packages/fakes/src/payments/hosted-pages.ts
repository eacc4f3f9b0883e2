import { Router, urlencoded } from 'express'
import { escapeHtml, page } from '../page'
import type { Machine } from './machine'
import { CARDS, type FakeCheckout } from './state'

const NOTE =
  '<p class="note">This is the local stand-in of the payment provider. No money moves here.</p>'

/** The provider's own pages: paying, connecting an account, and a look at what is there. */
export function hostedPages(machine: Machine, onChange: () => void): Router {
  const router = Router()
  // For these pages only: the API reads its bodies itself, and a body can be read once.
  const readForm = urlencoded({ extended: false })

  router.get('/pay/:id', (request, response) => {
    const checkout = machine.findCheckout(request.params.id)
    response.send(payPage(checkout))
  })
  router.post('/pay/:id', readForm, (request, response) => {
    const checkout = machine.findCheckout(request.params.id)
    const body = request.body as Record<string, string>
    const refusal = machine.pay(checkout, { card: body['card'] ?? '' })
    onChange()
    if (refusal) response.status(402).send(payPage(checkout, refusal))
    else response.redirect(303, checkout.successUrl.replace('{CHECKOUT_SESSION_ID}', checkout.id))
  })
  router.get('/onboarding/:account', (request, response) => {
    const name = machine.state.accounts[request.params.account]?.name ?? ''
    response.send(
      page(
        'Connect an account',
        `<h1>Connect ${escapeHtml(name)}</h1>${NOTE}
         <p>A real provider asks here for the business, its owners and its bank account.</p>
         <form method="post"><button type="submit">Done</button></form>`,
      ),
    )
  })
  router.post('/onboarding/:account', (request, response) => {
    machine.finishOnboarding(request.params.account)
    onChange()
    response.redirect(303, String(request.query['return'] ?? '/'))
  })
  router.get('/', (_request, response) => response.send(indexPage(machine)))
  return router
}

function payPage(checkout: FakeCheckout, refusal?: string): string {
  if (checkout.status !== 'open') {
    return page(
      'Payment',
      `<h1>This payment page is closed</h1>${NOTE}<p><a href="${escapeHtml(checkout.cancelUrl)}">Back</a></p>`,
    )
  }
  return page(
    'Payment',
    `<h1>${escapeHtml(checkout.title)}: ${amountText(checkout)}</h1>${NOTE}
     ${refusal ? `<p class="wrong" role="alert">${escapeHtml(refusal)}</p>` : ''}
     <form method="post">
     <label for="card">Card number</label>
     <input id="card" name="card" inputmode="numeric" autocomplete="off" required value="${CARDS.good}">
     <label for="expiry">Expiry</label><input id="expiry" name="expiry" autocomplete="off" required value="12 / 34">
     <label for="cvc">CVC</label><input id="cvc" name="cvc" autocomplete="off" required value="123">
     <label for="name">Name on card</label><input id="name" name="name" autocomplete="off" value="Test Card">
     <p><button type="submit">Pay ${amountText(checkout)}</button>
     <a class="button" href="${escapeHtml(checkout.cancelUrl)}">Back</a></p></form>
     <p class="note">Test cards: ${CARDS.good} pays; ${CARDS.declined} is declined; ${CARDS.insufficient} has too little on it;
     ${CARDS.refundPends} is refunded slowly; ${CARDS.refundFails} cannot be refunded.</p>`,
  )
}

function amountText({ amount, currency }: FakeCheckout): string {
  const code = currency.toUpperCase()
  const digits =
    new Intl.NumberFormat('en', { style: 'currency', currency: code }).resolvedOptions()
      .maximumFractionDigits ?? 2
  return `${code} ${(amount / 10 ** digits).toFixed(digits)}`
}

function indexPage({ state }: Machine): string {
  const rows = (title: string, items: readonly (readonly string[])[]) =>
    `<h2>${title}</h2><table>${items
      .slice(-50)
      .reverse()
      .map((cells) => `<tr>${cells.map((cell) => `<td>${escapeHtml(cell)}</td>`).join('')}</tr>`)
      .join('')}</table>`
  return page(
    'Payments stand-in',
    `<h1>Payments stand-in</h1>${NOTE}
     ${rows(
       'Accounts',
       Object.values(state.accounts).map((a) => [
         a.id,
         a.name,
         a.chargesEnabled ? 'ready' : 'not ready',
       ]),
     )}
     ${rows(
       'Checkouts',
       Object.values(state.checkouts).map((c) => [c.id, c.title, amountText(c), c.status]),
     )}
     ${rows(
       'Refunds',
       Object.values(state.refunds).map((r) => [r.id, String(r.amount), r.status]),
     )}
     ${rows(
       'Events',
       state.events.map((e) => [e.id, e.type, e.objectId]),
     )}`,
  )
}
