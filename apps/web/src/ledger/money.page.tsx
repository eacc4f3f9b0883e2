import { useQuery, useSuspenseQuery, type QueryClient } from '@tanstack/react-query'
import { useRef, useState } from 'react'
import { Link, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router'
import { makeFormat, type Format } from '../academies/format'
import { localDayOf } from '../academies/local-day'
import { academyQuery } from '../academies/queries'
import { addressOf } from '../api/client'
import { sentenceOf } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { PageHead } from '../ui/page-head'
import { EmptyState, ErrorState, SkeletonRows } from '../ui/states'
import { useNow } from '../ui/use-now'
import { AttestStrip } from './attest-strip'
import { isSameFigure } from './figure'
import { FigureDrawer } from './figure-drawer'
import { MoneyTable } from './money-table'
import { moneyQuery, type MoneyCard, type OpenFigure } from './queries'

/** The year asked for; without one, the year that it is where the academy is. */
const yearOf = (asked: string | null, now: number, zone: string): number =>
  Number(asked ?? localDayOf(now, zone).slice(0, 4))

export const loader =
  (client: QueryClient) =>
  async ({ params, request }: LoaderFunctionArgs) => {
    const slug = params['academy'] ?? ''
    const { zone } = await client.query({ ...academyQuery(slug), staleTime: 'static' })
    const year = yearOf(new URL(request.url).searchParams.get('year'), Date.now(), zone)
    void client.query(moneyQuery(slug, year)).catch(() => undefined)
    return null
  }

/** The money card: what was earned month by month, and what every figure is made of. */
export default function MoneyPage() {
  const { academy: slug = '' } = useParams()
  const [query] = useSearchParams()
  const { data: academy } = useSuspenseQuery(academyQuery(slug))
  const year = yearOf(query.get('year'), useNow(), academy.zone)
  const card = useQuery(moneyQuery(slug, year))
  useTitle(`Money ${year}`)
  if (card.isLoadingError) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(card.error)} onRetry={() => void card.refetch()} />
      </main>
    )
  }
  const csv = addressOf('ledger.export', { academy: slug, query: { year: String(year) } })
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
      {card.data ? (
        // Another year is another card: no figure stays open from the one before.
        <Card key={year} academy={slug} card={card.data} format={makeFormat(academy)} />
      ) : (
        <div className="card">
          <SkeletonRows rows={8} />
        </div>
      )}
    </main>
  )
}

function Card(props: { academy: string; card: MoneyCard; format: Format }) {
  const { academy, card, format } = props
  const [open, setOpen] = useState<OpenFigure | null>(null)
  const opener = useRef<Element | null>(null)
  const toggle = (figure: OpenFigure) => {
    opener.current = document.activeElement
    setOpen((had) => (isSameFigure(had, figure) ? null : figure))
  }
  const close = () => {
    if (!open) return
    setOpen(null)
    if (opener.current instanceof HTMLElement) opener.current.focus()
  }
  return (
    <div
      className="card"
      onKeyDown={(event) => {
        if (event.key === 'Escape') close()
      }}
    >
      {card.clinics.length === 0 ? (
        <div className="p-4">
          <EmptyState>
            Nothing in {card.year} yet. The first place that is paid opens the card.
          </EmptyState>
        </div>
      ) : (
        <MoneyTable card={card} open={open} onOpen={toggle} format={format} />
      )}
      {open && (
        <FigureDrawer
          key={JSON.stringify(open)}
          academy={academy}
          year={card.year}
          open={open}
          format={format}
          onClose={close}
        />
      )}
      <AttestStrip card={card} format={format} open={open} onOpen={toggle} />
    </div>
  )
}
