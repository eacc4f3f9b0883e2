import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, useParams, useSearchParams } from 'react-router'
import { addressOf } from '../api/client'
import { sentenceOf } from '../api/problem'
import { makeFormat } from '../academies/format'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { PageHead } from '../ui/page-head'
import { EmptyState, ErrorState, SkeletonRows } from '../ui/states'
import { AttestStrip } from './attest-strip'
import { FigureDrawer } from './figure-drawer'
import { MoneyTable } from './money-table'
import { moneyQuery, type OpenFigure } from './queries'
import { useNow } from '../ui/use-now'

/** The money card: what was earned month by month, and what every figure is made of. */
export default function MoneyPage() {
  const { academy: slug = '' } = useParams()
  const [query] = useSearchParams()
  const thisYear = new Date(useNow()).getFullYear()
  const year = Number(query.get('year') ?? thisYear)
  const card = useQuery(moneyQuery(slug, year))
  const [open, setOpen] = useState<OpenFigure | null>(null)
  useTitle(`Money ${year}`)
  if (card.isError) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(card.error)} onRetry={() => void card.refetch()} />
      </main>
    )
  }
  const csv = addressOf('ledger.export', { academy: slug, query: { year: String(year) } })
  const format =
    card.data && makeFormat({ locale: 'en-IE', currency: card.data.currency, zone: 'UTC' })
  const toggle = (figure: OpenFigure) =>
    setOpen((had) => (had && JSON.stringify(had) === JSON.stringify(figure) ? null : figure))
  return (
    <main id="main" className="wrap">
      <PageHead
        title={`${year}, earned month by month`}
        sub="Money is counted in the month its session is held, net of tax. Pencil is paid for but not yet played. Press a figure to see what is in it."
        actions={
          <>
            <Link className={buttonClass()} to={paths.money(slug, year - 1)}>
              {year - 1}
            </Link>
            <Link className={buttonClass()} to={paths.money(slug, year + 1)}>
              {year + 1}
            </Link>
            <a className={buttonClass()} href={csv} download>
              Download for the books
            </a>
          </>
        }
      />
      {!card.data || !format ? (
        <div className="card">
          <SkeletonRows rows={8} />
        </div>
      ) : (
        <div className="card">
          {card.data.clinics.length === 0 ? (
            <div className="p-4">
              <EmptyState>
                Nothing in {year} yet. The first place that is paid opens the card.
              </EmptyState>
            </div>
          ) : (
            <MoneyTable card={card.data} open={open} onOpen={toggle} />
          )}
          {open && (
            <FigureDrawer
              key={JSON.stringify(open)}
              academy={slug}
              year={year}
              open={open}
              format={format}
              onClose={() => setOpen(null)}
            />
          )}
          <AttestStrip card={card.data} format={format} open={open} onOpen={toggle} />
        </div>
      )}
    </main>
  )
}
