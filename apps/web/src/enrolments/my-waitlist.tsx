import type { Format } from '../academies/format'
import { sentenceOf } from '../api/problem'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { useLeaveWaitlist, type MyPlaces } from './queries'

/** What the family waits for, and the way out of each queue. */
export function MyWaitlist(props: { mine: MyPlaces; slug: string; format: Format }) {
  const { mine, slug, format } = props
  const leave = useLeaveWaitlist(slug)
  const waiting = mine.waitlist.filter(({ state }) => state === 'waiting')
  if (waiting.length === 0) return null
  return (
    <section>
      <h2 className="mt-8 mb-3">Waiting for a place</h2>
      {leave.error && (
        <div className="mb-3">
          <Notice kind="flag">{sentenceOf(leave.error)}</Notice>
        </div>
      )}
      <ul className="reg">
        {waiting.map((entry) => (
          <li key={entry.id} className="waitrow">
            <span>
              <b>{entry.clinic.title}</b>
              {entry.sessionStartsAt && `, ${format.day(entry.sessionStartsAt)}`}
              <br />
              <span className="soft">
                {entry.golferName}, number {entry.position} in the queue
              </span>
            </span>
            <Button
              kind="quiet"
              waiting={leave.isPending && leave.variables === entry.id && 'Leaving…'}
              onClick={() => leave.mutate(entry.id)}
            >
              Leave
              <span className="vh"> the queue for {entry.clinic.title}</span>
            </Button>
          </li>
        ))}
      </ul>
    </section>
  )
}
