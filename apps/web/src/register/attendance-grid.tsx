import { useState } from 'react'
import type { Format } from '../academies/format'
import type { Session } from '../clinics/queries'
import { Mark, type MarkName } from '../ui/mark'
import { useNow } from '../ui/use-now'
import { Across, type Layout } from './across'
import { AttendanceHead } from './attendance-head'
import { moveFocus } from './move-focus'
import type { CardRow } from './queries'

export interface GridProps {
  /** All of the run's, also where the layout has one half of them. */
  sessions: readonly Session[]
  layout: Layout
  rows: readonly CardRow[]
  format: Format
  /** Pressing a session's number opens it; left out for who may not change sessions. */
  onSession?: (session: Session) => void
}

/** In how many of these sessions the golfer was on the grass. */
const countOf = ({ marks }: CardRow, part: readonly Session[]): number =>
  part.filter(({ id }) => marks[id] === 'present' || marks[id] === 'late').length

const orNothing = (count: number) => (count === 0 ? '–' : count)

/** A table of golfers and sessions. One Tab leads into it; the arrow keys go on from there. */
export function AttendanceGrid({ sessions, layout, rows, format, onSession }: GridProps) {
  const now = useNow()
  const current = sessions.find(
    ({ endsAt, state }) => Date.parse(endsAt) > now && state === 'planned',
  )
  const classOf = (session: Session) =>
    [session.id === current?.id ? 'now' : '', session.state === 'called-off' ? 'off' : '']
      .filter(Boolean)
      .join(' ')
  return (
    <table className="sc att rfold" onKeyDown={moveFocus}>
      <AttendanceHead layout={layout} format={format} {...(onSession ? { onSession } : {})} />
      <GolferRows sessions={sessions} layout={layout} rows={rows} classOf={classOf} />
      <Totals sessions={sessions} layout={layout} rows={rows} classOf={classOf} />
    </table>
  )
}

interface PartProps extends Pick<GridProps, 'sessions' | 'layout' | 'rows'> {
  classOf: (session: Session) => string
}

function GolferRows({ sessions, layout, rows, classOf }: PartProps) {
  const [wanted, setWanted] = useState('')
  const cells = rows.flatMap(({ golferId }) =>
    layout.halves.flat().map(({ id }) => `${golferId} ${id}`),
  )
  // The cell that Tab leads to: where the focus was last, and at first the first of them.
  const entry = cells.includes(wanted) ? wanted : cells[0]
  return (
    <tbody>
      {rows.map((row) => (
        <tr key={row.golferId}>
          <th scope="row">
            {row.name}
            {row.note && <small>{row.note}</small>}
          </th>
          <Across
            layout={layout}
            cell={(session) => {
              const cell = `${row.golferId} ${session.id}`
              return (
                <td
                  key={session.id}
                  tabIndex={cell === entry ? 0 : -1}
                  className={`mk ${classOf(session)}`}
                  onFocus={() => setWanted(cell)}
                >
                  <CellMark mark={row.marks[session.id]} isOff={session.state === 'called-off'} />
                </td>
              )
            }}
            sum={(part) => <td className="ctr sum">{orNothing(countOf(row, part))}</td>}
            total={<td className="ctr tot">{orNothing(countOf(row, sessions))}</td>}
          />
        </tr>
      ))}
      {rows.length === 0 && (
        <tr>
          <th scope="row">Nobody yet</th>
          <td colSpan={widthOf(layout)} className="l">
            The first place that is taken opens this card.
          </td>
        </tr>
      )}
    </tbody>
  )
}

const widthOf = ({ halves, labels, hasTotal }: Layout): number =>
  halves.flat().length + labels.length + (hasTotal ? 1 : 0)

function Totals({ sessions, layout, rows, classOf }: PartProps) {
  const countAll = (part: readonly Session[]) =>
    orNothing(rows.reduce((sum, row) => sum + countOf(row, part), 0))
  return (
    <tfoot>
      <tr>
        <th scope="row">On the grass</th>
        <Across
          layout={layout}
          cell={(session) => (
            <td key={session.id} className={`ctr ${classOf(session)}`}>
              {countAll([session])}
            </td>
          )}
          sum={(part) => <td className="ctr sum">{countAll(part)}</td>}
          total={<td className="ctr tot">{countAll(sessions)}</td>}
        />
      </tr>
      <tr>
        <th scope="row">Places taken</th>
        <Across
          layout={layout}
          cell={(session) => (
            <td key={session.id} className="ctr">
              {session.taken}/{session.capacity}
            </td>
          )}
          sum={() => <td className="sum" />}
          total={<td className="tot" />}
        />
      </tr>
    </tfoot>
  )
}

function CellMark({ mark, isOff }: { mark: MarkName | undefined; isOff: boolean }) {
  if (isOff) return <span className="vh">Called off</span>
  return mark ? <Mark mark={mark} /> : <span className="vh">No place</span>
}
