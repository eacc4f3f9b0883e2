import { formatLocalDay } from '@marram/schedule/format'
import type { Format } from '../academies/format'
import { minutesOfDay, type Board } from './board-times'
import { Slip } from './slip'

/** One day of the board: its name, its areas, and what is in each. */
export function BoardDay(props: {
  academy: string
  board: Board
  day: Board['days'][number]
  format: Format
  /** Where a minute of the day stands, in percent of the board's width. */
  at: (minutes: number) => number
  now: number
  isToday: boolean
  /** Where the line of this moment stands; null where it is not on this day. */
  nowAt: number | null
}) {
  const { academy, board, day, format, at, now, isToday, nowAt } = props
  const { dayLocal, duskAt } = day
  const duskLeft = duskAt && `${at(minutesOfDay(duskAt, board.zone))}%`
  const sessions = board.sessions.filter(({ heldOn }) => heldOn === dayLocal)
  return (
    <>
      <DayName dayLocal={dayLocal} locale={format.locale} isToday={isToday} />
      <ul className="areas">
        {board.areas.map(({ id, name }) => (
          <li key={id}>{name}</li>
        ))}
      </ul>
      <div className="day">
        {duskAt && duskLeft && (
          <span
            className="duskline"
            style={{ left: duskLeft }}
            role="img"
            aria-label={`${format.dusk.word} ${format.time(duskAt)}`}
          />
        )}
        {nowAt !== null && <span className="nowline" style={{ left: `${nowAt}%` }} />}
        {board.areas.map((area, index) => (
          <div key={area.id} className="lane">
            {duskLeft && !area.hasLamps && !area.isCovered && (
              <span className="dark" style={{ left: duskLeft }} />
            )}
            {duskAt && index === firstDark(board) && (
              <span className="duskt" aria-hidden>
                {format.dusk.word} {format.time(duskAt)}
              </span>
            )}
            {sessions
              .filter((session) => session.areas.some(({ id }) => id === area.id))
              .map((session) => (
                <Slip
                  key={session.id}
                  academy={academy}
                  session={session}
                  format={format}
                  at={at}
                  now={now}
                />
              ))}
          </div>
        ))}
      </div>
    </>
  )
}

function DayName(props: { dayLocal: string; locale: string; isToday: boolean }) {
  const { dayLocal, locale, isToday } = props
  const [weekday] = formatLocalDay({ dayLocal, locale, style: 'weekday' }).split(/[ ,]/)
  return (
    <div className={isToday ? 'dname today' : 'dname'}>
      {weekday}
      <small>
        {isToday ? 'Today, ' : ''}
        {formatLocalDay({ dayLocal, locale, style: 'short' })}
      </small>
    </div>
  )
}

/** The lane that carries the time of dusk: the first that it makes dark. */
function firstDark({ areas }: Board): number {
  const index = areas.findIndex(({ hasLamps, isCovered }) => !hasLamps && !isCovered)
  return Math.max(0, index)
}
