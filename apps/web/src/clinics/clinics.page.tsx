import { useQuery, type QueryClient } from '@tanstack/react-query'
import { Link, useParams, type LoaderFunctionArgs } from 'react-router'
import { scopeOf } from '@marram/contract/routes'
import { makeFormat } from '../academies/format'
import { academyQuery } from '../academies/queries'
import { rolesIn, useSession } from '../accounts/queries'
import { sentenceOf } from '../api/problem'
import { together } from '../api/together'
import { coachesQuery } from '../coaches/queries'
import { useTitle } from '../layouts/accent'
import { useMay } from '../layouts/staff.layout'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { Initials } from '../ui/initials'
import { PageHead } from '../ui/page-head'
import { PlaceTicks } from '../ui/place-ticks'
import { EmptyState, ErrorState, SkeletonRows } from '../ui/states'
import { clinicsQuery, type ClinicInList } from './queries'

const STATES = { draft: 'Draft', published: 'On the page', withdrawn: 'Off the page' } as const

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) => {
    const { academy = '' } = params
    void client.query(clinicsQuery(academy)).catch(() => undefined)
    void client.query(academyQuery(academy)).catch(() => undefined)
    return null
  }

/** Every clinic of the academy: what runs, what comes, what has been. */
export default function ClinicsPage() {
  const { academy: slug = '' } = useParams()
  const may = useMay()
  const clinics = useQuery(clinicsQuery(slug))
  const academy = useQuery(academyQuery(slug))
  const mayOpen = useMayOpenCard(slug)
  useTitle('Clinics')
  const { error, retry } = together(clinics, academy)
  if (error) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(error)} onRetry={retry} />
      </main>
    )
  }
  const format = academy.data && makeFormat(academy.data)
  return (
    <main id="main" className="wrap">
      <PageHead
        title="Clinics"
        sub="Those that run come first, then those ahead, then those that have been."
        actions={
          may('clinics:write') && (
            <Link className={buttonClass({ kind: 'go' })} to={paths.newClinic(slug)}>
              New clinic
            </Link>
          )
        }
      />
      {!clinics.data || !format ? (
        <div className="card">
          <SkeletonRows rows={6} />
        </div>
      ) : clinics.data.clinics.length === 0 ? (
        <EmptyState>No clinics yet. Say when, where and for how many.</EmptyState>
      ) : (
        <div className="card">
          <table className="sc stack">
            <thead>
              <tr>
                <th scope="col">Clinic</th>
                <th scope="col" className="l">
                  Next session
                </th>
                <th scope="col" className="l">
                  Coach
                </th>
                <th scope="col">Held</th>
                <th scope="col" className="l">
                  Places
                </th>
                <th scope="col" className="l">
                  State
                </th>
              </tr>
            </thead>
            <tbody>
              {clinics.data.clinics.map((clinic) => (
                <tr key={clinic.id}>
                  <th scope="row">
                    {mayOpen(clinic) ? (
                      <Link to={paths.clinicCard(slug, clinic.id)}>{clinic.title}</Link>
                    ) : (
                      clinic.title
                    )}
                  </th>
                  <td className="l">
                    {clinic.nextStartsAt
                      ? `${format.day(clinic.nextStartsAt)}, ${format.time(clinic.nextStartsAt)}`
                      : clinic.lastStartsAt
                        ? `Ended ${format.day(clinic.lastStartsAt, 'short')}`
                        : '–'}
                  </td>
                  <td className="l">
                    {clinic.coaches.map((coach) => (
                      <Initials key={coach.id} of={coach.initials} />
                    ))}
                  </td>
                  <td data-label="Held">
                    {clinic.sessionsHeld}/{clinic.sessionsTotal}
                  </td>
                  <td className="l">
                    {clinic.nextStartsAt ? (
                      <>
                        <PlaceTicks taken={clinic.taken} capacity={clinic.capacity} />
                        {clinic.waiting > 0 && ` ${clinic.waiting} waiting`}
                      </>
                    ) : (
                      '–'
                    )}
                  </td>
                  <td className="l">{STATES[clinic.state]}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
    </main>
  )
}

/** Whose card the person may open: everybody's, for a coach those they teach, or none. */
function useMayOpenCard(slug: string): (clinic: Pick<ClinicInList, 'coaches'>) => boolean {
  const { data: session } = useSession()
  const scope = scopeOf(rolesIn(session, slug), 'places:read')
  const coaches = useQuery({ ...coachesQuery(slug), enabled: scope === 'own' })
  const me = coaches.data?.coaches.find(({ accountId }) => accountId === session?.account?.id)
  return (clinic) => scope === 'all' || clinic.coaches.some(({ id }) => id === me?.id)
}
