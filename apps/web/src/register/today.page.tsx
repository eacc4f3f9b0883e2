import { useQuery, useSuspenseQuery, type QueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router'
import { formatLocalDay, formatTime } from '@marram/schedule/format'
import { shiftDay, todayIn } from '../academies/local-day'
import { academyQuery, type Academy } from '../academies/queries'
import { sentenceOf } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { EmptyState, ErrorState, SkeletonRows } from '../ui/states'
import { useNow } from '../ui/use-now'
import { DaySheet } from './day-sheet'
import { firstRegister } from './first-register'
import { dayQuery, type Register } from './queries'

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
  const title = formatLocalDay({ dayLocal: date, locale, style: 'weekday' })
  useTitle(title)

  if (day.isPending) {
    return (
      <main id="main" className="hand">
        <h1 className="p-4">{title}</h1>
        <SkeletonRows rows={6} />
      </main>
    )
  }
  if (day.isLoadingError) {
    return (
      <main id="main" className="hand">
        <ErrorState sentence={sentenceOf(day.error)} onRetry={() => void day.refetch()} />
      </main>
    )
  }
  return (
    <main id="main" className="hand">
      <div className="bar">
        <h1 className="text-name">{title}</h1>
        <span className="actions">
          <Link
            className={buttonClass()}
            to={paths.today(slug, shiftDay(date, -1))}
            aria-label="The day before"
          >
            ‹
          </Link>
          <Link
            className={buttonClass()}
            to={paths.today(slug, shiftDay(date, 1))}
            aria-label="The day after"
          >
            ›
          </Link>
        </span>
      </div>
      <Registers key={date} academy={academy} date={date} registers={day.data.registers} />
    </main>
  )
}

function Registers(props: { academy: Academy; date: string; registers: readonly Register[] }) {
  const { academy, date, registers } = props
  // Chosen once for a day: a mark pressed after a session's end must not lead to the next sheet.
  const [chosenId, setChosenId] = useState(
    () => firstRegister(registers, Date.now())?.session.id ?? null,
  )
  const current = registers.find(({ session }) => session.id === chosenId) ?? registers[0]
  const now = useNow()
  if (!current) {
    return (
      <div className="p-4">
        <EmptyState>No session on this day.</EmptyState>
      </div>
    )
  }
  return (
    <>
      {registers.length > 1 && (
        <nav className="strip" aria-label="Sessions of the day">
          {registers.map((register) => (
            <button
              key={register.session.id}
              type="button"
              aria-current={register === current ? 'true' : undefined}
              onClick={() => setChosenId(register.session.id)}
            >
              {formatTime({
                at: register.session.startsAt,
                zone: register.session.zone,
                locale: academy.locale,
              })}
              <small>{stateOf(register, now)}</small>
            </button>
          ))}
        </nav>
      )}
      <DaySheet key={current.session.id} academy={academy} date={date} register={current} />
    </>
  )
}

function stateOf({ session, rows }: Register, now: number): string {
  if (session.state === 'called-off') return 'Called off'
  if (session.registerState === 'closed') return 'Done'
  const minutes = Math.round((Date.parse(session.startsAt) - now) / 60_000)
  if (minutes > 0 && minutes <= 90) return `In ${minutes} min`
  return `${rows.length} ${rows.length === 1 ? 'golfer' : 'golfers'}`
}
