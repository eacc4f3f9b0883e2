import { Link } from 'react-router'
import { makeFormat, type Format } from '../academies/format'
import { paths } from '../paths'
import { Drawing } from '../ui/drawing'
import { MOST_TICKS, PlaceTicks } from '../ui/place-ticks'
import { spanOf, type BoardSession } from './board-times'

/** A session on the board, from its start to its end, with its name beside it. */
export function Slip(props: {
  academy: string
  session: BoardSession
  format: Format
  at: (minutes: number) => number
  now: number
}) {
  const { academy, session, at, now } = props
  const format = makeFormat({ ...props.format, zone: session.zone })
  const span = spanOf(session)
  const [from, to] = [at(span.from), at(span.to)]
  const isDone = Date.parse(session.endsAt) < now
  const isOff = session.state === 'called-off'
  const isWarning = session.darkMinutes > 0 && !isDone && !isOff
  const kind = isOff ? 'done less' : isWarning ? 'warn' : isDone ? 'done' : ''
  // The name stands on the side where there is room.
  const isLeft = from > 55
  const spoken = [
    session.clinicTitle,
    format.session(session),
    `${session.taken} of ${session.capacity} places taken`,
    ...(isOff ? ['called off'] : []),
    ...(isWarning ? [`runs past ${format.dusk.inText}`] : []),
  ].join(', ')
  return (
    <>
      <Link
        className={`slip ${kind}`}
        style={{ left: `${from}%`, width: `${to - from}%` }}
        to={paths.clinicCard(academy, session.clinicId)}
        aria-label={spoken}
      >
        <b>{session.coaches[0]?.initials ?? ''}</b>
        <span className={`pl2 c${ticksClass(session.capacity)}`}>
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
  [6, 8, 10, MOST_TICKS].find((size) => capacity <= size) ?? 14
