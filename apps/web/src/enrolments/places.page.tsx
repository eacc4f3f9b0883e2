import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query'
import { Link, useParams, type LoaderFunctionArgs } from 'react-router'
import { makeFormat } from '../academies/format'
import { academyPageQuery } from '../clinics/queries'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { EmptyState } from '../ui/states'
import { myPlacesQuery } from './queries'
import { standingOf } from './standing'

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) => {
    const slug = params['academy'] ?? ''
    return Promise.all([
      client.query({ ...myPlacesQuery(slug), staleTime: 'static' }),
      client.query({ ...academyPageQuery(slug), staleTime: 'static' }),
    ])
  }

/** Every place the person and their family have or had here. */
export default function PlacesPage() {
  const { academy: slug = '' } = useParams()
  const { data: mine } = useSuspenseQuery(myPlacesQuery(slug))
  const { data: page } = useSuspenseQuery(academyPageQuery(slug))
  useTitle(`Places – ${page.academy.name}`)
  return (
    <main id="main" className="wrap narrow">
      <div className="head">
        <h1>Places</h1>
      </div>
      {mine.enrolments.length === 0 && (
        <EmptyState
          action={
            <Link className={buttonClass({ kind: 'go' })} to={paths.academy(slug)}>
              See the clinics
            </Link>
          }
        >
          Nothing taken yet.
        </EmptyState>
      )}
      <ul className="fix">
        {mine.enrolments.map((enrolment) => {
          const [first] = enrolment.places
          const format = makeFormat({ ...page.academy, zone: enrolment.clinic.zone })
          return (
            <li key={enrolment.id}>
              <div className="day">
                {first && format.day(first.startsAt)}
                <small>{first && format.range(first)}</small>
              </div>
              <div className="mid">
                <h3>
                  <Link to={paths.myPlace(slug, enrolment.id)}>{enrolment.clinic.title}</Link>
                </h3>
                <p>
                  {enrolment.golfer.isMe ? 'For you' : `For ${enrolment.golfer.name}`},{' '}
                  {enrolment.places.length === 1
                    ? '1 session'
                    : `${enrolment.places.length} sessions`}
                </p>
              </div>
              <div className="pl">
                <b>{standingOf(enrolment)}</b>
              </div>
              <div className="pr">
                {enrolment.totalMinor === 0 ? 'Free' : format.money(enrolment.totalMinor)}
              </div>
            </li>
          )
        })}
      </ul>
    </main>
  )
}
