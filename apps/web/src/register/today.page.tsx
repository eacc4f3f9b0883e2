import { useQuery, useSuspenseQuery, type QueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router'
import { formatLocalDay, formatTime } from '@marram/schedule/format'
import { academyQuery } from '../academies/queries'
import { sentenceOf } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { EmptyState, ErrorState, SkeletonRows } from '../ui/states'
import { DaySheet } from './day-sheet'
import { dayQuery, type Register } from './queries'

/** Today where the academy is, as a local date. */
const todayIn = (timeZone: string): string =>
  new Intl.DateTimeFormat('en-CA', { timeZone }).format(new Date(Date.now()))

export const loader =
  (client: QueryClient) =>
  async ({ params, request }: LoaderFunctionArgs) => {
    const slug = params['academy'] ?? ''
    const { zone } = await client.query({ ...academyQuery(slug), staleTime: 'static' })
    const day = new URL(request.url).searchParams.get('day') ?? todayIn(zone)
    void client.query(dayQuery(slug, day)).catch(() => undefined)
    return null
  }

/** The coach's day: the next session is open already. */
export default function TodayPage() {
  const { academy: slug = '' } = useParams()
  const [query] = useSearchParams()
  const { data: academy } = useSuspenseQuery(academyQuery(slug))
  const { locale } = academy
  const date = query.get('day') ?? todayIn(academy.zone)
  const day = useQuery(dayQuery(slug, date))
  const [chosen, setChosen] = useState<string | null>(null)
  const title = formatLocalDay({ dayLocal: date, locale, style: 'weekday' })
  useTitle(title)

  if (day.isPending) {
    return (
      <main id="main" className="hand body">
        <h1 className="p-4">{title}</h1>
        <SkeletonRows rows={6} />
      </main>
    )
  }
  if (day.isError) {
    return (
      <main id="main" className="hand">
        <ErrorState sentence={sentenceOf(day.error)} onRetry={() => void day.refetch()} />
      </main>
    )
  }
  const { registers, zone } = day.data
  const current = registers.find(({ session }) => session.id === chosen) ?? nextOf(registers)
  return (
    <main id="main" className="hand">
      <div className="bar">
        <h1 className="text-name">{title}</h1>
        <span className="actions">
          <Link
            className={buttonClass()}
            to={paths.today(slug, shift(date, -1))}
            aria-label="The day before"
          >
            ‹
          </Link>
          <Link
            className={buttonClass()}
            to={paths.today(slug, shift(date, 1))}
            aria-label="The day after"
          >
            ›
          </Link>
        </span>
      </div>
      {registers.length > 1 && (
        <nav className="strip" aria-label="Sessions of the day">
          {registers.map((register) => (
            <a
              key={register.session.id}
              href={`#${register.session.id}`}
              aria-current={register === current ? 'true' : undefined}
              onClick={(event) => {
                event.preventDefault()
                setChosen(register.session.id)
              }}
            >
              {formatTime({ at: register.session.startsAt, zone, locale })}
              <small>{stateOf(register)}</small>
            </a>
          ))}
        </nav>
      )}
      {current ? (
        <DaySheet
          key={current.session.id}
          academy={slug}
          date={date}
          register={current}
          locale={locale}
        />
      ) : (
        <div className="p-4">
          <EmptyState>No session on this day.</EmptyState>
        </div>
      )}
    </main>
  )
}

/** The one that goes on or comes next; after the last, the first that is still open. */
function nextOf(registers: readonly Register[]): Register | undefined {
  const now = Date.now()
  return (
    registers.find(
      ({ session }) => Date.parse(session.endsAt) > now && session.state === 'planned',
    ) ??
    registers.find(({ session }) => session.registerState === 'open') ??
    registers[0]
  )
}

function stateOf({ session, rows }: Register): string {
  if (session.state === 'called-off') return 'Called off'
  if (session.registerState === 'closed') return 'Done'
  const minutes = Math.round((Date.parse(session.startsAt) - Date.now()) / 60_000)
  if (minutes > 0 && minutes <= 90) return `In ${minutes} min`
  return `${rows.length} ${rows.length === 1 ? 'golfer' : 'golfers'}`
}

function shift(day: string, by: number): string {
  return new Date(Date.parse(`${day}T12:00:00Z`) + by * 86_400_000).toISOString().slice(0, 10)
}
