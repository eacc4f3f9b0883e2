import { useState } from 'react'
import { Link } from 'react-router'
import { formatLocalDay } from '@marram/schedule/format'
import { makeFormat, type Format } from '../academies/format'
import { localDayOf } from '../academies/local-day'
import { paths } from '../paths'
import { PlaceTicks } from '../ui/place-ticks'
import { Tag } from '../ui/tag'
import { useNow } from '../ui/use-now'
import type { Board } from './board-times'
import { listOf } from './list-of'

/** The week in the hand: one day at a time, in order of time. */
export function DayBoard(props: { academy: string; board: Board; format: Format }) {
  const { academy, board, format } = props
  const today = localDayOf(useNow(), board.zone)
  const isThisWeek = board.days.some(({ dayLocal }) => dayLocal === today)
  const [day, setDay] = useState(isThisWeek ? today : (board.days[0]?.dayLocal ?? today))
  const sessions = board.sessions.filter(({ heldOn }) => heldOn === day)
  const dusk = board.days.find(({ dayLocal }) => dayLocal === day)?.duskAt
  return (
    <>
      <nav className="days" aria-label="Days">
        {board.days.map(({ dayLocal }) => {
          // The two parts stand apart, so this day's order does not depend on the academy's.
          const [weekday = '', date = ''] = formatLocalDay({
            dayLocal,
            locale: 'en-GB',
            style: 'weekday',
          }).split(' ')
          return (
            <button
              key={dayLocal}
              type="button"
              aria-current={dayLocal === day ? 'date' : undefined}
              onClick={() => setDay(dayLocal)}
            >
              {weekday}
              <small>{date}</small>
            </button>
          )
        })}
      </nav>
      <p className="py-3">
        {dusk && (
          <b className="haartext">
            {format.dusk.word} {format.time(dusk)}
          </b>
        )}
        {sessions.length === 0 && ' Nothing on this day.'}
      </p>
      <ul className="reg">
        {sessions.map((session) => (
          <li key={session.id} className="waitrow">
            <span>
              <b>
                {makeFormat({ ...format, zone: session.zone }).range(session)}{' '}
                <Link to={paths.clinicCard(academy, session.clinicId)}>{session.clinicTitle}</Link>
              </b>
              <br />
              <span className="soft">
                {listOf(session.areas.map(({ name }) => name))},{' '}
                {session.coaches.map(({ name }) => name).join(', ')}
              </span>
              {session.state === 'called-off' && (
                <Tag kind="haar" drawing="wind">
                  Called off
                </Tag>
              )}
              {session.darkMinutes > 0 && session.state === 'planned' && (
                <Tag kind="flag" drawing="flag">
                  {session.darkMinutes} min past {format.dusk.inText}
                </Tag>
              )}
            </span>
            <PlaceTicks taken={session.taken} capacity={session.capacity} />
          </li>
        ))}
      </ul>
    </>
  )
}
