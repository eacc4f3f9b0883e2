import { escapeHtml, page } from '../../page'
import { CARDS } from '../cards'
import type { FakeCheckout } from '../state'

export const NOTE =
  '<p class="note">This is the local stand-in of the payment provider. No money moves here.</p>'

const WHAT_CARDS_DO: readonly (readonly [string, string])[] = [
  [CARDS.good, 'pays'],
  [CARDS.declined, 'is declined'],
  [CARDS.insufficient, 'has too little on it'],
  [CARDS.lost, 'was lost'],
  [CARDS.stolen, 'was stolen'],
  [CARDS.expired, 'has expired'],
  [CARDS.wrongCode, 'has another security code'],
  [CARDS.broken, 'cannot be processed'],
  [CARDS.refundPends, 'pays, and is refunded slowly'],
  [CARDS.refundFails, 'pays, and cannot be refunded'],
  [CARDS.fraudulent, 'pays, and is disputed as fraud'],
  [CARDS.notReceived, 'pays, and is disputed as not received'],
]

/** The page where a checkout is paid, with what was wrong with the last card. */
export function payPage(checkout: FakeCheckout, refusal?: string): string {
  const { cancelUrl } = checkout
  const back = cancelUrl ? `<a class="button" href="${escapeHtml(cancelUrl)}">Back</a>` : ''
  if (checkout.status !== 'open') {
    return page('Payment', `<h1>This payment page is closed</h1>${NOTE}<p>${back}</p>`)
  }
  const cards = WHAT_CARDS_DO.map(
    ([card, what]) => `<tr><td><code>${card}</code></td><td>${what}</td></tr>`,
  )
  return page(
    'Payment',
    `<h1>${escapeHtml(checkout.title)}: ${amountText(checkout)}</h1>${NOTE}
     ${refusal ? `<p class="wrong" role="alert">${escapeHtml(refusal)}</p>` : ''}
     <form method="post">
     ${field('card', 'Card number', CARDS.good, 'inputmode="numeric"')}
     ${field('expiry', 'Expiry', '12 / 34')}
     ${field('cvc', 'CVC', '123')}
     ${field('name', 'Name on card', 'Test Card')}
     <p><button type="submit">Pay ${amountText(checkout)}</button> ${back}</p></form>
     <h2>Test cards</h2><table>${cards.join('')}</table>`,
  )
}

function field(name: string, label: string, value: string, attributes = ''): string {
  return `<label for="${name}">${label}</label>
    <input id="${name}" name="${name}" autocomplete="off" required value="${value}" ${attributes}>`
}

/** The code and the amount, with as many figures after the point as the currency has. */
export function amountText({ amount, currency }: { amount: number; currency: string }): string {
  const code = currency.toUpperCase()
  const { maximumFractionDigits: digits = 2 } = new Intl.NumberFormat('en', {
    style: 'currency',
    currency: code,
  }).resolvedOptions()
  return `${code} ${(amount / 10 ** digits).toFixed(digits)}`
}
