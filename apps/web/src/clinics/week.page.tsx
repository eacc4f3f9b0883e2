import { useQuery } from '@tanstack/react-query'
import { Link, useParams, useSearchParams } from 'react-router'
import { formatLocalDay } from '@marram/schedule/format'
import { makeFormat, type Format } from '../academies/format'
import { academyQuery } from '../academies/queries'
import { sentenceOf } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { useMay } from '../layouts/staff.layout'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { PageHead } from '../ui/page-head'
import { ErrorState, SkeletonRows } from '../ui/states'
import type { Board } from './board-times'
import { boardQuery } from './queries'
import { DayBoard } from './day-board'
import { WeekBoard } from './week-board'

/** The week: time by area, with what is taken and where the dark begins. */
export default function WeekPage() {
  const { academy: slug = '' } = useParams()
  const [query] = useSearchParams()
  const may = useMay()
  const from = mondayOf(query.get('from') ?? todayLocal())
  const to = shiftDay(from, 6)
  const board = useQuery(boardQuery(slug, from, to))
  const academy = useQuery(academyQuery(slug))
  useTitle('Week')
  const error = board.error ?? academy.error
  if (error) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(error)} onRetry={() => void board.refetch()} />
      </main>
    )
  }
  const locale = academy.data?.locale ?? 'en-IE'
  const title = `Week of ${formatLocalDay({ dayLocal: from, locale, style: 'long' })}`
  return (
    <main id="main" className="wrap">
      <PageHead
        title={title}
        sub={
          board.data &&
          academy.data && (
            <>
              <Fact sessions={board.data.sessions} />{' '}
              <SunsetFact
                board={board.data}
                format={makeFormat({ ...academy.data, zone: board.data.zone })}
              />
            </>
          )
        }
        actions={
          <>
            <Link
              className={buttonClass()}
              to={paths.week(slug, shiftDay(from, -7))}
              aria-label="The week before"
            >
              ‹
            </Link>
            <Link className={buttonClass()} to={paths.week(slug)}>
              This week
            </Link>
            <Link
              className={buttonClass()}
              to={paths.week(slug, shiftDay(from, 7))}
              aria-label="The week after"
            >
              ›
            </Link>
            {may('clinics:write') && (
              <Link className={buttonClass({ kind: 'go' })} to={paths.newClinic(slug)}>
                New clinic
              </Link>
            )}
          </>
        }
      />
      {!board.data || !academy.data ? (
        <div className="card">
          <SkeletonRows rows={10} />
        </div>
      ) : (
        <>
          <div className="ondesk">
            <WeekBoard
              academy={slug}
              board={board.data}
              format={makeFormat({ ...academy.data, zone: board.data.zone })}
            />
          </div>
          <div className="onhand">
            <DayBoard
              academy={slug}
              board={board.data}
              format={makeFormat({ ...academy.data, zone: board.data.zone })}
            />
          </div>
        </>
      )}
    </main>
  )
}

function Fact({
  sessions,
}: {
  sessions: readonly { taken: number; capacity: number; darkMinutes: number; state: string }[]
}) {
  const on = sessions.filter(({ state }) => state === 'planned')
  const taken = on.reduce((sum, session) => sum + session.taken, 0)
  const capacity = on.reduce((sum, session) => sum + session.capacity, 0)
  const dark = on.filter(({ darkMinutes }) => darkMinutes > 0).length
  return (
    <>
      {on.length} {on.length === 1 ? 'session' : 'sessions'}, {taken} of {capacity} places taken.{' '}
      {dark > 0 && (
        <span className="flagtext">
          {dark === 1 ? 'One session runs' : `${dark} sessions run`} past sunset without lamps.
        </span>
      )}
    </>
  )
}

/** "Sunset moves from 16:09 on Monday to 16:05 on Sunday." */
function SunsetFact({ board, format }: { board: Board; format: Format }) {
  const first = board.days[0]?.duskAt
  const last = board.days.at(-1)?.duskAt
  if (!first || !last) return null
  return (
    <>
      Sunset moves from <b className="text-haar">{format.time(first)}</b> on Monday to{' '}
      <b className="text-haar">{format.time(last)}</b> on Sunday.
    </>
  )
}

const todayLocal = (): string => new Intl.DateTimeFormat('en-CA').format(new Date(Date.now()))

export function shiftDay(day: string, by: number): string {
  return new Date(Date.parse(`${day}T12:00:00Z`) + by * 86_400_000).toISOString().slice(0, 10)
}

function mondayOf(day: string): string {
  const weekday = (new Date(`${day}T12:00:00Z`).getUTCDay() + 6) % 7
  return shiftDay(day, -weekday)
}
