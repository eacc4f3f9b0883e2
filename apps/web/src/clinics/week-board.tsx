import type { CSSProperties } from 'react'
import type { Format } from '../academies/format'
import { localDayOf } from '../academies/local-day'
import { Drawing } from '../ui/drawing'
import { PlaceTicks } from '../ui/place-ticks'
import { useNow } from '../ui/use-now'
import { BoardDay } from './board-day'
import { hourInShort, hoursOf, minutesOfDay, type Board } from './board-times'

/** Seven days, a lane for each area, a slip for each session, and the dusk line. */
export function WeekBoard(props: { academy: string; board: Board; format: Format }) {
  const { academy, board, format } = props
  const hours = hoursOf(board)
  const span = (hours.to - hours.from) * 60
  const at = (minutes: number) => ((minutes - hours.from * 60) / span) * 100
  const now = useNow()
  const today = localDayOf(now, board.zone)
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
              {hourInShort(hour, format.locale)}
            </span>
          ))}
        </div>
        {board.days.map((day) => (
          <BoardDay
            key={day.dayLocal}
            academy={academy}
            board={board}
            day={day}
            format={format}
            at={at}
            now={now}
            isToday={day.dayLocal === today}
            nowAt={day.dayLocal === today && isNowShown ? at(nowMinutes) : null}
          />
        ))}
      </div>
      <BoardKey format={format} />
    </>
  )
}

/** What is drawn, in words. */
function BoardKey({ format: { dusk } }: { format: Format }) {
  return (
    <ul className="boardkey">
      <li>
        <i className="k-line" /> {dusk.word}
      </li>
      <li>
        <i className="k-fog" /> Too dark, no lamps here
      </li>
      <li>
        <PlaceTicks taken={2} capacity={3} /> Place taken, place free
      </li>
      <li className="flagtext">
        <Drawing of="flag" className="inline-flag" /> Runs past {dusk.inText}
      </li>
    </ul>
  )
}
