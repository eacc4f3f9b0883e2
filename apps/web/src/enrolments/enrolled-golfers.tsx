import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router'
import type { Format } from '../academies/format'
import { sentenceOf } from '../api/problem'
import { paths } from '../paths'
import { ErrorState, SkeletonRows } from '../ui/states'
import { placesOfClinicQuery } from './queries'
import { standingAtDesk } from './standing'

/** Who has a place in a clinic and how it is paid, and who waits for one. */
export function EnrolledGolfers(props: { academy: string; clinicId: string; format: Format }) {
  const { academy, clinicId, format } = props
  const places = useQuery(placesOfClinicQuery(academy, clinicId))
  return (
    <section>
      <div className="sh">
        <h2>Who has a place</h2>
      </div>
      {places.isPending && <SkeletonRows rows={3} />}
      {places.isError && (
        <ErrorState sentence={sentenceOf(places.error)} onRetry={() => void places.refetch()} />
      )}
      {places.data && (
        <table className="bill">
          <tbody>
            {places.data.enrolments
              .filter(({ state }) => state !== 'cancelled')
              .map((enrolment) => (
                <tr key={enrolment.id}>
                  <td>
                    <Link to={paths.golfer(academy, enrolment.golfer.id)}>
                      {enrolment.golfer.name}
                    </Link>
                    <br />
                    <span className="soft note">{standingAtDesk(enrolment)}</span>
                  </td>
                  <td>
                    {enrolment.totalMinor === 0 ? 'Free' : format.money(enrolment.totalMinor)}
                  </td>
                </tr>
              ))}
            <tr>
              <td>Waiting</td>
              <td>{places.data.waitlist.length === 0 ? 'Nobody' : places.data.waitlist.length}</td>
            </tr>
          </tbody>
        </table>
      )}
      {places.data && places.data.waitlist.length > 0 && (
        <ol className="list-decimal pl-6">
          {places.data.waitlist.map((entry) => (
            <li key={entry.id}>
              {entry.golferName}
              {entry.state === 'offered' && entry.offeredUntil
                ? `, offered until ${format.time(entry.offeredUntil)}`
                : ''}
            </li>
          ))}
        </ol>
      )}
    </section>
  )
}
