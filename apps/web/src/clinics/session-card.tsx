import type { Format } from '../academies/format'
import { Drawing } from '../ui/drawing'
import type { ClinicPage } from './queries'

type PageSession = ClinicPage['clinic']['sessions'][number]

const FOLDS_OVER = 4

/** The dates of a run as a card: OUT half and IN half, which stand one above the other on a phone. */
export function SessionCard(props: { sessions: readonly PageSession[]; format: Format }) {
  const { sessions, format } = props
  const half = sessions.length > FOLDS_OVER ? Math.ceil(sessions.length / 2) : sessions.length
  const halves = [sessions.slice(0, half), sessions.slice(half)].filter((part) => part.length > 0)
  return (
    <>
      <div className="card ondesk">
        <Table sessions={sessions} foldAt={halves.length > 1 ? half : null} format={format} />
      </div>
      <div className="foldstack onhand">
        {halves.map((part, index) => (
          <div className="card" key={index}>
            <Table sessions={part} foldAt={null} format={format} />
          </div>
        ))}
      </div>
    </>
  )
}

function Table(props: { sessions: readonly PageSession[]; foldAt: number | null; format: Format }) {
  const { sessions, foldAt, format } = props
  const cell = (session: PageSession, index: number) =>
    ['ctr', index === foldAt ? 'fold' : '', session.state === 'called-off' ? 'off' : '']
      .filter(Boolean)
      .join(' ')
  return (
    <table className="sc dates">
      <thead>
        <tr>
          <th scope="col">Session</th>
          {sessions.map(({ id, number }, index) => (
            <th key={id} scope="col" className={index === foldAt ? 'ctr fold' : 'ctr'}>
              {number}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        <tr>
          <th scope="row">Date</th>
          {sessions.map((session, index) => (
            <td key={session.id} className={cell(session, index)}>
              {format.day(session.startsAt, 'short')}
            </td>
          ))}
        </tr>
        <tr>
          <th scope="row">{format.dusk.word}</th>
          {sessions.map((session, index) => (
            <td key={session.id} className={cell(session, index)}>
              {session.duskAt ? format.time(session.duskAt) : '–'}
            </td>
          ))}
        </tr>
        <tr>
          <th scope="row">Light</th>
          {sessions.map((session, index) => (
            <td key={session.id} className={cell(session, index)}>
              <Light session={session} />
            </td>
          ))}
        </tr>
      </tbody>
    </table>
  )
}

function Light({ session }: { session: PageSession }) {
  if (session.state === 'called-off') return <>Called off</>
  if (session.darkMinutes > 0) {
    return (
      <span className="tag haar">
        <Drawing of="dusk" />
        {session.darkMinutes} min dark
      </span>
    )
  }
  const isLit = session.areas.some(({ hasLamps, isCovered }) => hasLamps || isCovered)
  return (
    <>
      {isLit
        ? session.areas.every(({ isCovered }) => isCovered)
          ? 'Covered'
          : 'Lamps'
        : 'Daylight'}
    </>
  )
}
