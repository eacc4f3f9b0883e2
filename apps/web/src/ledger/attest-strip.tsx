import type { Format } from '../academies/format'
import { Figure } from './figure'
import type { FigureName, MoneyCard, OpenFigure } from './queries'

/** The foot of the card: taken, less refunded, less fees, and what is still to be earned. */
export function AttestStrip(props: {
  card: MoneyCard
  format: Format
  open: OpenFigure | null
  onOpen: (figure: OpenFigure) => void
}) {
  const { card, format, open, onOpen } = props
  const figure = (name: FigureName, title: string, amountMinor: number) => (
    <Figure
      isOpen={open?.figure === name && open.month === undefined}
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
        <span className="op" aria-label="less">
          −
        </span>
      </div>
      <div>
        <dt>Refunded</dt>
        <dd>{figure('refunded', `Refunded in ${card.year}`, card.refundedMinor)}</dd>
        <dd>
          {card.refunds} {card.refunds === 1 ? 'refund' : 'refunds'}
        </dd>
        <span className="op" aria-label="less">
          −
        </span>
      </div>
      <div>
        <dt>Fees</dt>
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
        <dd>net, for sessions not yet held</dd>
      </div>
    </dl>
  )
}
