import type { Answer } from '@marram/contract'
import { Fragment, useRef, type KeyboardEvent } from 'react'
import type { Format } from '../academies/format'
import type { Session } from '../clinics/queries'
import { Drawing } from '../ui/drawing'
import { Mark, type MarkName } from '../ui/mark'
import { useNow } from '../ui/use-now'

type Row = Answer<'register.card'>['rows'][number]

const FOLDS_OVER = 4

interface CardProps {
  sessions: readonly Session[]
  rows: readonly Row[]
  format: Format
  /** Pressing a session's number opens it; left out for who may not change sessions. */
  onSession?: (session: Session) => void
}

/** The scorecard: OUT after the first half, IN after the second; on a phone it folds. */
export function AttendanceCard(props: CardProps) {
  const { sessions } = props
  const half = sessions.length > FOLDS_OVER ? Math.ceil(sessions.length / 2) : sessions.length
  const halves = [sessions.slice(0, half), sessions.slice(half)].filter((part) => part.length > 0)
  return (
    <>
      <div className="card ondesk scroller">
        <Grid {...props} halves={halves} />
      </div>
      <div className="foldstack onhand">
        {halves.map((part, index) => (
          <div className="card" key={index}>
            <Grid
              {...props}
              halves={[part]}
              labels={halves.length > 1 ? [index === 0 ? 'OUT' : 'IN'] : []}
              hasTotal={index === halves.length - 1}
            />
          </div>
        ))}
      </div>
    </>
  )
}

function Grid({
  rows,
  sessions,
  halves,
  labels = halves.length > 1 ? ['OUT', 'IN'] : [],
  hasTotal = true,
  format,
  onSession,
}: CardProps & { halves: readonly (readonly Session[])[]; labels?: string[]; hasTotal?: boolean }) {
  const table = useRef<HTMLTableElement>(null)
  const now = useNow()
  const current = sessions.find(
    ({ endsAt, state }) => Date.parse(endsAt) > now && state === 'planned',
  )
  const cellClass = (session: Session) =>
    [session.id === current?.id ? 'now' : '', session.state === 'called-off' ? 'off' : '']
      .filter(Boolean)
      .join(' ')
  const counted = (row: Row, part: readonly Session[]) =>
    part.filter(({ id }) => row.marks[id] === 'present' || row.marks[id] === 'late').length
  const total = (row: Row) => counted(row, sessions)
  const sum = (value: number) => (value === 0 ? '–' : value)
  return (
    <table
      className="sc att rfold"
      ref={table}
      onKeyDown={(event) => moveFocus(event, table.current)}
    >
      <thead>
        <tr>
          <th scope="col">Golfer</th>
          {halves.map((part, index) => (
            <Fragment key={index}>
              {part.map((session) => (
                <th key={session.id} scope="col" className="ctr">
                  {onSession ? (
                    <button
                      type="button"
                      className="headcell"
                      aria-label={`Session ${session.number}, ${format.day(session.startsAt)}: change or call off`}
                      onClick={() => onSession(session)}
                    >
                      {session.number}
                    </button>
                  ) : (
                    session.number
                  )}
                </th>
              ))}
              {labels[index] && (
                <th scope="col" className="ctr sum">
                  {labels[index]}
                </th>
              )}
            </Fragment>
          ))}
          {hasTotal && (
            <th scope="col" className="ctr tot">
              TOTAL
            </th>
          )}
        </tr>
        <tr className="under">
          <th scope="row">Date</th>
          {halves.map((part, index) => (
            <Fragment key={index}>
              {part.map((session) => (
                <th key={session.id} className="ctr">
                  {format.day(session.startsAt, 'short')}
                </th>
              ))}
              {labels[index] && <th className="sum" />}
            </Fragment>
          ))}
          {hasTotal && <th className="tot" />}
        </tr>
        <tr className="under">
          <th scope="row">{format.dusk.word}</th>
          {halves.map((part, index) => (
            <Fragment key={index}>
              {part.map((session) => (
                <th key={session.id} className={session.darkMinutes > 0 ? 'ctr flagtext' : 'ctr'}>
                  {session.darkMinutes > 0 && (
                    <Drawing
                      of="flag"
                      className="inline-flag"
                      label={`Runs past ${format.dusk.inText}`}
                    />
                  )}
                  {session.duskAt ? format.time(session.duskAt) : '–'}
                </th>
              ))}
              {labels[index] && <th className="sum" />}
            </Fragment>
          ))}
          {hasTotal && <th className="tot" />}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.golferId}>
            <th scope="row">
              {row.name}
              {row.note && <small>{row.note}</small>}
            </th>
            {halves.map((part, index) => (
              <Fragment key={index}>
                {part.map((session) => (
                  <td key={session.id} tabIndex={-1} className={`mk ${cellClass(session)}`}>
                    <CellMark mark={row.marks[session.id]} isOff={session.state === 'called-off'} />
                  </td>
                ))}
                {labels[index] && <td className="ctr sum">{sum(counted(row, part))}</td>}
              </Fragment>
            ))}
            {hasTotal && <td className="ctr tot">{sum(total(row))}</td>}
          </tr>
        ))}
        {rows.length === 0 && (
          <tr>
            <th scope="row">Nobody yet</th>
            <td colSpan={sessions.length + labels.length + (hasTotal ? 1 : 0)} className="l">
              The first place that is taken opens this card.
            </td>
          </tr>
        )}
      </tbody>
      <tfoot>
        <tr>
          <th scope="row">On the grass</th>
          {halves.map((part, index) => (
            <Fragment key={index}>
              {part.map((session) => (
                <td key={session.id} className={`ctr ${cellClass(session)}`}>
                  {sum(rows.filter((row) => counted(row, [session]) > 0).length)}
                </td>
              ))}
              {labels[index] && (
                <td className="ctr sum">
                  {sum(rows.reduce((all, row) => all + counted(row, part), 0))}
                </td>
              )}
            </Fragment>
          ))}
          {hasTotal && (
            <td className="ctr tot">{sum(rows.reduce((all, row) => all + total(row), 0))}</td>
          )}
        </tr>
        <tr>
          <th scope="row">Places taken</th>
          {halves.map((part, index) => (
            <Fragment key={index}>
              {part.map((session) => (
                <td key={session.id} className="ctr">
                  {session.taken}/{session.capacity}
                </td>
              ))}
              {labels[index] && <td className="sum" />}
            </Fragment>
          ))}
          {hasTotal && <td className="tot" />}
        </tr>
      </tfoot>
    </table>
  )
}

function CellMark({ mark, isOff }: { mark: MarkName | undefined; isOff: boolean }) {
  if (isOff) return <span className="vh">Called off</span>
  return mark ? <Mark mark={mark} /> : <span className="vh">No place</span>
}

/** Arrow keys move between marks, Home and End to the row's ends. */
function moveFocus(event: KeyboardEvent, table: HTMLTableElement | null): void {
  const cell = (event.target as HTMLElement).closest('td.mk')
  if (!table || !(cell instanceof HTMLTableCellElement)) return
  const row = cell.parentElement as HTMLTableRowElement
  const inRow = [...row.querySelectorAll<HTMLElement>('td.mk')]
  const at = inRow.indexOf(cell)
  const beside = (step: number) =>
    (table.rows[row.rowIndex + step]?.querySelectorAll<HTMLElement>('td.mk') ?? [])[at]
  const next: Record<string, HTMLElement | undefined> = {
    ArrowLeft: inRow[at - 1],
    ArrowRight: inRow[at + 1],
    ArrowUp: beside(-1),
    ArrowDown: beside(1),
    Home: inRow[0],
    End: inRow.at(-1),
  }
  const target = next[event.key]
  if (!target) return
  event.preventDefault()
  target.focus()
}
