import type { Format } from '../academies/format'
import type { Session } from '../clinics/queries'
import { Drawing } from '../ui/drawing'
import { Across, type Layout } from './across'

/** Dates and light come to no sum. */
const NOTHING_SUMMED = { sum: () => <th className="sum" />, total: <th className="tot" /> }

/** The sessions of a card: number, date, and dusk with a flag where it comes too early. */
export function AttendanceHead(props: {
  layout: Layout
  format: Format
  onSession?: (session: Session) => void
}) {
  const { layout, format, onSession } = props
  return (
    <thead>
      <tr>
        <th scope="col">Golfer</th>
        <Across
          layout={layout}
          cell={(session) => (
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
          )}
          sum={(_, label) => (
            <th scope="col" className="ctr sum">
              {label}
            </th>
          )}
          total={
            <th scope="col" className="ctr tot">
              TOTAL
            </th>
          }
        />
      </tr>
      <tr className="under">
        <th scope="row">Date</th>
        <Across
          layout={layout}
          cell={(session) => (
            <th key={session.id} className="ctr">
              {format.day(session.startsAt, 'short')}
            </th>
          )}
          {...NOTHING_SUMMED}
        />
      </tr>
      <tr className="under">
        <th scope="row">{format.dusk.word}</th>
        <Across
          layout={layout}
          cell={(session) => (
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
          )}
          {...NOTHING_SUMMED}
        />
      </tr>
    </thead>
  )
}
