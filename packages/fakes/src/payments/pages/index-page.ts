import { escapeHtml, page } from '../../page'
import type { FakeState } from '../state'
import { NOTE, amountText } from './pay-page'

const MOST_SHOWN = 50

/** A look at what the stand-in remembers, newest first. */
export function indexPage(state: FakeState): string {
  return page(
    'Payments stand-in',
    `<h1>Payments stand-in</h1>${NOTE}
     ${table(
       'Accounts',
       Object.values(state.accounts).map((account) => [
         account.id,
         account.name,
         account.chargesEnabled ? 'ready' : 'not ready',
       ]),
     )}
     ${table(
       'Checkouts',
       Object.values(state.checkouts).map((checkout) => [
         checkout.id,
         checkout.title,
         amountText(checkout),
         checkout.status,
       ]),
     )}
     ${[
       ['Refunds', state.refunds] as const,
       ['Disputes', state.disputes] as const,
       ['Payouts', state.payouts] as const,
     ]
       .map(([title, records]) => table(title, Object.values(records).map(moneyRow)))
       .join('')}
     ${table(
       'Events',
       state.events.map(({ id, type, objectId }) => [id, type, objectId]),
     )}`,
  )
}

const moneyRow = (record: { id: string; amount: number; currency: string; status: string }) => [
  record.id,
  amountText(record),
  record.status.replace('_', ' '),
]

function table(title: string, rows: readonly (readonly string[])[]): string {
  const lines = rows
    .slice(-MOST_SHOWN)
    .reverse()
    .map((cells) => `<tr>${cells.map((cell) => `<td>${escapeHtml(cell)}</td>`).join('')}</tr>`)
  return `<h2>${title}</h2><table>${lines.join('')}</table>`
}
