import type { Format } from '../academies/format'
import { Figure, isSameFigure, type Openable } from './figure'
import type { FigureName, MoneyCard } from './queries'

/** The foot of the card: taken, less refunded, less fees, and what is still to be earned. */
export function AttestStrip(props: Openable & { card: MoneyCard; format: Format }) {
  const { card, format, open, onOpen } = props
  const figure = (name: FigureName, title: string, amountMinor: number) => (
    <Figure
      isOpen={isSameFigure(open, { figure: name, title })}
      label={`${title}: ${format.money(amountMinor)}`}
      onOpen={() => onOpen({ figure: name, title })}
    >
      {format.money(amountMinor)}
    </Figure>
  )
  return (
    <dl className="attest">
      <div>
        <dt>Taken</dt>
        <dd>{figure('taken', `Taken in ${card.year}`, card.takenMinor)}</dd>
        <dd>
          {card.payments} {card.payments === 1 ? 'payment' : 'payments'}, tax in it
        </dd>
      </div>
      <div>
        <dt>
          <Less /> Refunded
        </dt>
        <dd className="text-flag">
          {figure('refunded', `Refunded in ${card.year}`, card.refundedMinor)}
        </dd>
        <dd>
          {card.refunds} {card.refunds === 1 ? 'refund' : 'refunds'}
        </dd>
      </div>
      <div>
        <dt>
          <Less /> Fees
        </dt>
        <dd>{figure('fees', `Fees in ${card.year}`, card.feesMinor)}</dd>
        <dd>the provider’s and ours</dd>
      </div>
      <div>
        <dt>Owed to and by golfers</dt>
        <dd>{figure('owed-at-desk', 'Owed at the desk', card.owedAtDeskMinor)}</dd>
        <dd>at the desk; {format.money(card.creditsOwedMinor)} of credit is owed to them</dd>
      </div>
      <div>
        <dt>Still to be earned</dt>
        <dd>{format.money(card.toEarnMinor)}</dd>
        <dd>net, for sessions not yet held, of any year</dd>
      </div>
    </dl>
  )
}

/** The operator between two figures; read out as a word. */
const Less = () => (
  <span className="op" role="img" aria-label="less">
    −
  </span>
)
