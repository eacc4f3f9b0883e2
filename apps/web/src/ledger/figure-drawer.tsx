import { useQuery } from '@tanstack/react-query'
import { useEffect, useRef } from 'react'
import { formatLocalDay } from '@marram/schedule/format'
import type { Format } from '../academies/format'
import { sentenceOf } from '../api/problem'
import { ErrorState, SkeletonRows } from '../ui/states'
import { accountInWords } from './account-words'
import { figureQuery, type OpenFigure } from './queries'

/** What a figure is made of: its transfers, which add up to it. The focus goes to its Close. */
export function FigureDrawer(props: {
  academy: string
  year: number
  open: OpenFigure
  format: Format
  onClose: () => void
}) {
  const { academy, year, open, format, onClose } = props
  const figure = useQuery(figureQuery(academy, year, open))
  const close = useRef<HTMLButtonElement>(null)
  useEffect(() => close.current?.focus(), [])
  return (
    <section className="drawer" aria-label={open.title}>
      <div className="dh">
        <div>
          <h2>
            {open.title}
            {figure.data && `: ${format.money(figure.data.totalMinor)}`}
          </h2>
          <p className="soft">{figure.data && transfersInWords(figure.data.transfers.length)}</p>
        </div>
        <button ref={close} type="button" className="linkish ml-auto" onClick={onClose}>
          Close
        </button>
      </div>
      {figure.isPending && <SkeletonRows rows={3} />}
      {figure.isLoadingError && (
        <ErrorState sentence={sentenceOf(figure.error)} onRetry={() => void figure.refetch()} />
      )}
      {figure.data && (
        <table className="sc led">
          <thead>
            <tr>
              <th scope="col">Date</th>
              <th scope="col">What</th>
              <th scope="col">Debit</th>
              <th scope="col">Credit</th>
              <th scope="col">Amount</th>
            </tr>
          </thead>
          <tbody>
            {figure.data.transfers.map((transfer) => (
              <tr key={transfer.id}>
                <td>
                  {formatLocalDay({
                    dayLocal: transfer.dayLocal,
                    locale: format.locale,
                    style: 'short',
                  })}
                </td>
                <td>{transfer.what}</td>
                <td>{transfer.debit.map(accountInWords).join('; ')}</td>
                <td>{transfer.credit.map(accountInWords).join('; ')}</td>
                <td>{format.money(transfer.amountMinor)}</td>
              </tr>
            ))}
          </tbody>
          <tfoot>
            <tr>
              <th scope="row" colSpan={4}>
                {open.title}
              </th>
              <td>{format.money(figure.data.totalMinor)}</td>
            </tr>
          </tfoot>
        </table>
      )}
    </section>
  )
}

function transfersInWords(count: number): string {
  return count === 1 ? 'One transfer makes this figure.' : `${count} transfers make this figure.`
}
