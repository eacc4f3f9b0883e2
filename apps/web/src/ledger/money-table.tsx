import type { Format } from '../academies/format'
import { MonthFigures, SumFigures, type Openable } from './figure'
import { allByMonth, inInk, totalOf, type MonthMoney } from './month-money'
import type { FigureName, MoneyCard, OpenFigure } from './queries'

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

/** A month, or what the months from one to another come to. */
type Column =
  | { kind: 'month'; label: string; month: number }
  | { kind: 'sum' | 'tot'; label: string; from: number; to: number }

const monthsOf = (from: number, to: number): Column[] =>
  MONTHS.slice(from, to + 1).map((label, index) => ({ kind: 'month', label, month: from + index }))

const OUT: readonly Column[] = [...monthsOf(0, 5), { kind: 'sum', label: 'OUT', from: 0, to: 5 }]
const IN: readonly Column[] = [
  ...monthsOf(6, 11),
  { kind: 'sum', label: 'IN', from: 6, to: 11 },
  { kind: 'tot', label: 'TOTAL', from: 0, to: 11 },
]
const YEAR = [...OUT, ...IN]

interface TableProps extends Openable {
  card: MoneyCard
  format: Format
}

/** Twelve months with OUT and IN halves; on a phone the halves stand one above the other. */
export function MoneyTable(props: TableProps) {
  return (
    <>
      <div className="ondesk">
        <Months {...props} columns={YEAR} />
      </div>
      <div className="onhand">
        <Months {...props} columns={OUT} />
        <Months {...props} columns={IN} />
      </div>
    </>
  )
}

function Months(props: TableProps & { columns: readonly Column[] }) {
  const { card, columns } = props
  return (
    <table className="sc money mfold">
      <thead>
        <tr>
          <th scope="col">Earned, {card.currency}</th>
          {columns.map(({ kind, label }) => (
            <th key={label} scope="col" className={kind === 'month' ? undefined : kind}>
              {label}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {card.clinics.map(({ clinicId, title, months }) => (
          <Row
            key={clinicId}
            {...props}
            title={title}
            amounts={months}
            opens={{ earned: 'earned', toEarn: 'to-earn', clinicId }}
          />
        ))}
        <Row
          {...props}
          title={'Late cancel\u00adlations'}
          amounts={inInk(card.lateCancellations)}
          opens={{ earned: 'late-cancellations' }}
        />
      </tbody>
      <tfoot>
        <Row {...props} title="All, net of tax" amounts={allByMonth(card)} />
        <Row
          {...props}
          title="Tax owed"
          className="tax"
          amounts={inInk(card.taxOwed)}
          opens={{ earned: 'tax-owed' }}
        />
      </tfoot>
    </table>
  )
}

function Row(
  props: TableProps & {
    columns: readonly Column[]
    title: string
    amounts: readonly MonthMoney[]
    /** The figures that its months open; left out for a row that is a sum itself. */
    opens?: { earned: FigureName; toEarn?: FigureName; clinicId?: string }
    className?: string
  },
) {
  const { card, columns, title, amounts, opens, className, ...rest } = props
  const isNow = (month: number) => month + 1 === card.currentMonth
  return (
    <tr className={className}>
      <th scope="row">{title}</th>
      {columns.map((column) => {
        if (column.kind !== 'month') {
          const amount = totalOf(amounts.slice(column.from, column.to + 1))
          return (
            <td key={column.label} className={column.kind}>
              <SumFigures amount={amount} format={props.format} />
            </td>
          )
        }
        const { label, month } = column
        const amount = totalOf(amounts.slice(month, month + 1))
        const figure = (name: FigureName): OpenFigure => ({
          figure: name,
          title: `${title}, ${label}`,
          month: month + 1,
          ...(opens?.clinicId ? { clinicId: opens.clinicId } : {}),
        })
        return (
          <td key={label} className={isNow(month) ? 'now' : undefined}>
            {opens ? (
              <MonthFigures
                {...rest}
                amount={amount}
                earned={figure(opens.earned)}
                {...(opens.toEarn ? { toEarn: figure(opens.toEarn) } : {})}
              />
            ) : (
              <SumFigures amount={amount} format={props.format} />
            )}
          </td>
        )
      })}
    </tr>
  )
}
