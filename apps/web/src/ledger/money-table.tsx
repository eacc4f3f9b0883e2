import { Fragment } from 'react'
import { Figure } from './figure'
import type { MoneyCard, OpenFigure } from './queries'

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

interface TableProps {
  card: MoneyCard
  open: OpenFigure | null
  onOpen: (figure: OpenFigure) => void
}

/** Twelve months with OUT and IN halves; on a phone the halves stand one above the other. */
export function MoneyTable(props: TableProps) {
  return (
    <>
      <div className="ondesk">
        <Half {...props} months={[...MONTHS.keys()]} hasTotal />
      </div>
      <div className="onhand">
        <Half {...props} months={[0, 1, 2, 3, 4, 5]} />
        <Half {...props} months={[6, 7, 8, 9, 10, 11]} hasTotal />
      </div>
    </>
  )
}

function Half({
  card,
  open,
  onOpen,
  months,
  hasTotal,
}: TableProps & { months: number[]; hasTotal?: boolean }) {
  const halfOf = (month: number) => (month === 5 ? 'OUT' : month === 11 ? 'IN' : null)
  const isNow = (month: number) => month + 1 === card.currentMonth
  const sumTo = (values: readonly number[], month: number) =>
    values.slice(month === 5 ? 0 : 6, month + 1).reduce((sum, value) => sum + value, 0)
  const earned = card.clinics.map(({ months: all }) => all.map(({ earnedMinor }) => earnedMinor))
  const whole = card.clinics.map(({ months: all }) =>
    all.map(({ earnedMinor, toEarnMinor }) => earnedMinor + toEarnMinor),
  )
  const totals = MONTHS.map((_, month) =>
    whole.reduce((sum, row) => sum + (row[month] ?? 0), card.lateCancellations[month] ?? 0),
  )
  const cells = (values: readonly number[], render: (month: number) => React.ReactNode) => (
    <>
      {months.map((month) => (
        <Fragment key={month}>
          <td className={isNow(month) ? 'now' : undefined}>{render(month)}</td>
          {halfOf(month) && <td className="sum">{whole100(sumTo(values, month))}</td>}
        </Fragment>
      ))}
      {hasTotal && (
        <td className="tot">{whole100(values.reduce((sum, value) => sum + value, 0))}</td>
      )}
    </>
  )
  return (
    <table className="sc money mfold">
      <thead>
        <tr>
          <th scope="col">Earned, {card.currency}</th>
          {months.map((month) => (
            <Fragment key={month}>
              <th scope="col">{MONTHS[month]}</th>
              {halfOf(month) && (
                <th scope="col" className="sum">
                  {halfOf(month)}
                </th>
              )}
            </Fragment>
          ))}
          {hasTotal && (
            <th scope="col" className="tot">
              TOTAL
            </th>
          )}
        </tr>
      </thead>
      <tbody>
        {card.clinics.map((clinic, row) => (
          <tr key={clinic.clinicId}>
            <th scope="row">{clinic.title}</th>
            {cells(whole[row] ?? [], (month) => {
              const { earnedMinor = 0, toEarnMinor = 0 } = clinic.months[month] ?? {}
              const isPencil = earnedMinor === 0 && toEarnMinor !== 0
              const amount = (earned[row]?.[month] ?? 0) + toEarnMinor
              if (amount === 0) return '–'
              const figure: OpenFigure = {
                figure: isPencil ? 'to-earn' : 'earned',
                title: `${clinic.title}, ${MONTHS[month] ?? ''}`,
                month: month + 1,
                clinicId: clinic.clinicId,
              }
              return (
                <Figure
                  isOpen={isSame(open, figure)}
                  isPencil={isPencil}
                  label={`${figure.title}: ${whole100(amount)}, ${isPencil ? 'paid, not yet earned' : 'earned'}`}
                  onOpen={() => onOpen(figure)}
                >
                  {whole100(amount)}
                </Figure>
              )
            })}
          </tr>
        ))}
        <tr>
          <th scope="row">Late cancellations</th>
          {cells(card.lateCancellations, (month) =>
            plainFigure({ figure: 'late-cancellations', month, title: 'Late cancellations' }),
          )}
        </tr>
      </tbody>
      <tfoot>
        <tr>
          <th scope="row">All, net of tax</th>
          {cells(totals, (month) => whole100(totals[month] ?? 0))}
        </tr>
        <tr className="tax">
          <th scope="row">Tax owed</th>
          {cells(card.taxOwed, (month) =>
            plainFigure({ figure: 'tax-owed', month, title: 'Tax owed' }),
          )}
        </tr>
      </tfoot>
    </table>
  )

  function plainFigure(given: {
    figure: 'late-cancellations' | 'tax-owed'
    month: number
    title: string
  }) {
    const values = given.figure === 'tax-owed' ? card.taxOwed : card.lateCancellations
    const amount = values[given.month] ?? 0
    if (amount === 0) return '–'
    const title = `${given.title}, ${MONTHS[given.month] ?? ''}`
    const figure: OpenFigure = { figure: given.figure, title, month: given.month + 1 }
    return (
      <Figure
        isOpen={isSame(open, figure)}
        label={`${title}: ${whole100(amount)}`}
        onOpen={() => onOpen(figure)}
      >
        {whole100(amount)}
      </Figure>
    )
  }
}

const isSame = (a: OpenFigure | null, b: OpenFigure): boolean =>
  a !== null && JSON.stringify(a) === JSON.stringify(b)

/** Whole units on the card; cents are in the drawer. Nothing is an en rule, a minus is a true one. */
function whole100(amountMinor: number): string {
  if (amountMinor === 0) return '–'
  return Math.round(amountMinor / 100)
    .toLocaleString('en-IE')
    .replace('-', '−')
}
