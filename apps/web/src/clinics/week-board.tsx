import { Fragment, type CSSProperties } from 'react'
import { Link } from 'react-router'
import { formatLocalDay } from '@marram/schedule/format'
import type { Format } from '../academies/format'
import { paths } from '../paths'
import { Drawing } from '../ui/drawing'
import { PlaceTicks } from '../ui/place-ticks'
import { dayOfInstant, hoursOf, minutesOfDay, type Board, type BoardSession } from './board-times'
import { useNow } from '../ui/use-now'

const MOST_TICKS = 12

/** Seven days, a lane for each area, a slip for each session, and the dusk line. */
export function WeekBoard(props: { academy: string; board: Board; format: Format }) {
  const { academy, board, format } = props
  const hours = hoursOf(board)
  const span = (hours.to - hours.from) * 60
  const at = (minutes: number) => ((minutes - hours.from * 60) / span) * 100
  const now = new Date(useNow()).toISOString()
  const today = dayOfInstant(now, board.zone)
  const nowMinutes = minutesOfDay(now, board.zone)
  const isNowShown = nowMinutes > hours.from * 60 && nowMinutes < hours.to * 60
  return (
    <>
      <div
        className="board"
        role="group"
        aria-label="Week board"
        style={{ '--hours': hours.to - hours.from } as CSSProperties}
      >
        <div className="hd">Day</div>
        <div className="hd">Area</div>
        <div className="hrs" aria-hidden>
          {Array.from(
            { length: hours.to - hours.from - 1 },
            (_, index) => hours.from + 1 + index,
          ).map((hour) => (
            <span key={hour} style={{ left: `${at(hour * 60)}%` }}>
              {hour}
            </span>
          ))}
        </div>
        {board.days.map(({ dayLocal, duskAt }) => (
          <Fragment key={dayLocal}>
            <div className={dayLocal === today ? 'dname today' : 'dname'}>
              {
                formatLocalDay({ dayLocal, locale: format.locale, style: 'weekday' }).split(
                  /[ ,]/,
                )[0]
              }
              <small>
                {dayLocal === today ? 'Today, ' : ''}
                {formatLocalDay({ dayLocal, locale: format.locale, style: 'short' })}
              </small>
            </div>
            <ul className="areas">
              {board.areas.map(({ id, name }) => (
                <li key={id}>{name}</li>
              ))}
            </ul>
            <div className="day">
              {duskAt && (
                <span
                  className="duskline"
                  style={{ left: `${at(minutesOfDay(duskAt, board.zone))}%` }}
                  role="img"
                  aria-label={`Sunset ${format.time(duskAt)}`}
                />
              )}
              {dayLocal === today && isNowShown && (
                <span className="nowline" style={{ left: `${at(nowMinutes)}%` }} />
              )}
              {board.areas.map((area, index) => (
                <div key={area.id} className="lane">
                  {duskAt && !area.hasLamps && !area.isCovered && (
                    <span
                      className="dark"
                      style={{ left: `${at(minutesOfDay(duskAt, board.zone))}%` }}
                    />
                  )}
                  {duskAt && index === firstDark(board) && (
                    <span className="duskt" aria-hidden>
                      Sunset {format.time(duskAt)}
                    </span>
                  )}
                  {board.sessions
                    .filter(({ heldOn }) => heldOn === dayLocal)
                    .filter((session) => session.areas.some(({ id }) => id === area.id))
                    .map((session) => (
                      <Slip
                        key={session.id}
                        academy={academy}
                        session={session}
                        format={format}
                        at={at}
                      />
                    ))}
                </div>
              ))}
            </div>
          </Fragment>
        ))}
      </div>
      <BoardKey />
    </>
  )
}

/** What is drawn, in words. */
function BoardKey() {
  return (
    <ul className="boardkey">
      <li>
        <i className="k-line" /> Sunset
      </li>
      <li>
        <i className="k-fog" /> Too dark, no lamps here
      </li>
      <li>
        <PlaceTicks taken={2} capacity={3} /> Place taken, place free
      </li>
      <li className="flagtext">
        <Drawing of="flag" className="inline-flag" /> Runs past sunset
      </li>
    </ul>
  )
}

function firstDark({ areas }: Board): number {
  const index = areas.findIndex(({ hasLamps, isCovered }) => !hasLamps && !isCovered)
  return Math.max(0, index)
}

function Slip(props: {
  academy: string
  session: BoardSession
  format: Format
  at: (minutes: number) => number
}) {
  const { academy, session, format, at } = props
  const from = at(minutesOfDay(session.startsAt, session.zone))
  const to = at(minutesOfDay(session.endsAt, session.zone))
  const isDone = Date.parse(session.endsAt) < useNow()
  const isOff = session.state === 'called-off'
  const isWarning = session.darkMinutes > 0 && !isDone && !isOff
  const kind = isOff ? 'done less' : isWarning ? 'warn' : isDone ? 'done' : ''
  // The name stands on the side where there is room.
  const isLeft = from > 55
  const spoken = `${session.clinicTitle}, ${format.session(session)}, ${session.taken} of ${session.capacity} places taken${isOff ? ', called off' : ''}${isWarning ? ', runs past sunset' : ''}`
  return (
    <>
      <Link
        className={`slip ${kind}`}
        style={{ left: `${from}%`, width: `${to - from}%` }}
        to={paths.clinicCard(academy, session.clinicId)}
        aria-label={spoken}
      >
        <b>{session.coaches[0]?.initials ?? ''}</b>
        <span
          className={`pl2 c${session.capacity > MOST_TICKS ? 14 : ticksClass(session.capacity)}`}
        >
          {session.capacity <= MOST_TICKS && (
            <PlaceTicks taken={session.taken} capacity={session.capacity} />
          )}
          <span className="frac">
            {session.taken}/{session.capacity}
          </span>
        </span>
      </Link>
      <span
        className={`slipname ${isWarning ? 'warn' : isDone || isOff ? 'done' : ''}`}
        style={isLeft ? { right: `${100 - from}%` } : { left: `${to}%` }}
        aria-hidden
      >
        {isWarning && <Drawing of="flag" className="inline-flag" />}
        {session.clinicTitle}
        {isOff && ', called off'}
      </span>
    </>
  )
}

/** Which of the widths at which ticks give way to a figure. */
const ticksClass = (capacity: number): number =>
  [6, 8, 10, 12].find((size) => capacity <= size) ?? 14
