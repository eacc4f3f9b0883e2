import { useQuery, useSuspenseQuery, type QueryClient } from '@tanstack/react-query'
import { Link, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router'
import { formatLocalDay } from '@marram/schedule/format'
import { makeFormat, type Format } from '../academies/format'
import { mondayOf, shiftDay, todayIn } from '../academies/local-day'
import { academyQuery } from '../academies/queries'
import { sentenceOf } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { useMay } from '../layouts/staff.layout'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { PageHead } from '../ui/page-head'
import { ErrorState, SkeletonRows } from '../ui/states'
import type { Board } from './board-times'
import { DayBoard } from './day-board'
import { boardQuery } from './queries'
import { WeekBoard } from './week-board'

/** The Monday of the week asked for; without one, of the week that it is where the academy is. */
const mondayAsked = (from: string | null, zone: string): string => mondayOf(from ?? todayIn(zone))

export const loader =
  (client: QueryClient) =>
  async ({ params, request }: LoaderFunctionArgs) => {
    const slug = params['academy'] ?? ''
    const { zone } = await client.query({ ...academyQuery(slug), staleTime: 'static' })
    const from = mondayAsked(new URL(request.url).searchParams.get('from'), zone)
    void client.query(boardQuery(slug, from, shiftDay(from, 6))).catch(() => undefined)
    return null
  }

/** The week: time by area, with what is taken and where the dark begins. */
export default function WeekPage() {
  const { academy: slug = '' } = useParams()
  const [query] = useSearchParams()
  const { data: academy } = useSuspenseQuery(academyQuery(slug))
  const from = mondayAsked(query.get('from'), academy.zone)
  const week = useQuery(boardQuery(slug, from, shiftDay(from, 6)))
  const board = week.data
  useTitle('Week')
  if (week.isLoadingError) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(week.error)} onRetry={() => void week.refetch()} />
      </main>
    )
  }
  const format = makeFormat({ ...academy, zone: board?.zone ?? academy.zone })
  const title = `Week of ${formatLocalDay({ dayLocal: from, locale: academy.locale, style: 'long' })}`
  return (
    <main id="main" className="wrap">
      <PageHead
        title={title}
        sub={
          board && (
            <>
              <Fact sessions={board.sessions} format={format} />{' '}
              <DuskFact board={board} format={format} />
            </>
          )
        }
        actions={<WeekActions academy={slug} from={from} />}
      />
      {!board ? (
        <div className="card">
          <SkeletonRows rows={10} />
        </div>
      ) : (
        <>
          <div className="ondesk">
            <WeekBoard academy={slug} board={board} format={format} />
          </div>
          <div className="onhand">
            {/* Another week begins on a day of its own. */}
            <DayBoard key={from} academy={slug} board={board} format={format} />
          </div>
        </>
      )}
    </main>
  )
}

function WeekActions({ academy, from }: { academy: string; from: string }) {
  const may = useMay()
  return (
    <>
      <Link
        className={buttonClass()}
        to={paths.week(academy, shiftDay(from, -7))}
        aria-label="The week before"
      >
        ‹
      </Link>
      <Link className={buttonClass()} to={paths.week(academy)}>
        This week
      </Link>
      <Link
        className={buttonClass()}
        to={paths.week(academy, shiftDay(from, 7))}
        aria-label="The week after"
      >
        ›
      </Link>
      {may('clinics:write') && (
        <Link className={buttonClass({ kind: 'go' })} to={paths.newClinic(academy)}>
          New clinic
        </Link>
      )}
    </>
  )
}

function Fact({ sessions, format }: { sessions: Board['sessions']; format: Format }) {
  const on = sessions.filter(({ state }) => state === 'planned')
  const taken = on.reduce((sum, session) => sum + session.taken, 0)
  const capacity = on.reduce((sum, session) => sum + session.capacity, 0)
  const dark = on.filter(({ darkMinutes }) => darkMinutes > 0).length
  return (
    <>
      {on.length} {on.length === 1 ? 'session' : 'sessions'}, {taken} of {capacity} places taken.{' '}
      {dark > 0 && (
        <span className="flagtext">
          {dark === 1 ? 'One session runs' : `${dark} sessions run`} past {format.dusk.inText}{' '}
          without lamps.
        </span>
      )}
    </>
  )
}

/** "Sunset moves from 16:09 on Monday to 16:05 on Sunday." */
function DuskFact({ board, format }: { board: Board; format: Format }) {
  const first = board.days[0]?.duskAt
  const last = board.days.at(-1)?.duskAt
  if (!first || !last) return null
  return (
    <>
      {format.dusk.word} moves from <b className="text-haar">{format.time(first)}</b> on Monday to{' '}
      <b className="text-haar">{format.time(last)}</b> on Sunday.
    </>
  )
}
