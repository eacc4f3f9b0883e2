import { useQuery, type QueryClient } from '@tanstack/react-query'
import { Link, useSearchParams, type LoaderFunctionArgs } from 'react-router'
import { sessionQuery, useSession } from '../accounts/queries'
import { sentenceOf } from '../api/problem'
import { together } from '../api/together'
import { ConnectPayments } from '../checkout/connect-payments'
import { paymentsQuery } from '../checkout/queries'
import { FirstClinic } from '../clinics/first-clinic'
import { clinicsQuery } from '../clinics/queries'
import { coachesQuery } from '../coaches/queries'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { Drawing } from '../ui/drawing'
import { Initials, initialsOf } from '../ui/initials'
import { OpeningList, OpeningStep } from '../ui/opening-list'
import { ErrorState, SkeletonRows } from '../ui/states'
import { FirstVenue } from '../venues/first-venue'
import { venuesQuery } from '../venues/queries'
import { OpenAcademy } from './open-academy'
import { LATER_STEPS, OpeningSteps } from './opening-steps'
import { academyQuery } from './queries'

/** What is wrong with an answer is said where it is read; the page comes up all the same. */
export const loader =
  (client: QueryClient) =>
  ({ request }: LoaderFunctionArgs) => {
    const slug = new URL(request.url).searchParams.get('academy')
    if (!slug) return Promise.allSettled([client.query(sessionQuery)])
    return Promise.allSettled([
      client.query(sessionQuery),
      client.query(academyQuery(slug)),
      client.query(venuesQuery(slug)),
      client.query(coachesQuery(slug)),
      client.query(clinicsQuery(slug)),
      client.query(paymentsQuery(slug)),
    ])
  }

/** Five sentences from nothing to a page that golfers can pay on. Each is kept as it is written. */
export default function OpenPage() {
  useTitle('Open an academy – Marram')
  const [query, setQuery] = useSearchParams()
  const { data: session } = useSession()
  const slug = query.get('academy')
  const account = session?.account
  return (
    <>
      <header className="mast">
        <div>
          <Link to={paths.home()} className="mark">
            <Drawing of="logo" />
            Marram
          </Link>
          <span className="flex-1" />
          {account && (
            <span className="who">
              <Initials of={initialsOf(account.name)} />
              <span>{account.name}</span>
            </span>
          )}
        </div>
      </header>
      <main id="main" className="wrap narrow">
        <div className="head">
          <h1>Open your academy</h1>
          <p className="sub">
            Five sentences. Change the green words, leave the rest. Everything is kept as you go.
          </p>
        </div>
        {slug ? (
          <GoOn slug={slug} />
        ) : (
          <OpeningList>
            <OpeningStep number={1} label="Who you are" state="now">
              <OpenAcademy onOpened={(academy) => setQuery({ academy }, { replace: true })} />
            </OpeningStep>
            {LATER_STEPS.map(({ label, about }, index) => (
              <OpeningStep key={label} number={index + 2} label={label} state="next">
                <p className="soft">{about}</p>
              </OpeningStep>
            ))}
          </OpeningList>
        )}
      </main>
    </>
  )
}

/** The steps of an academy that is being opened, each as far as it was kept. */
function GoOn({ slug }: { slug: string }) {
  const { data: session } = useSession()
  const academy = useQuery(academyQuery(slug))
  const venues = useQuery(venuesQuery(slug))
  const coaches = useQuery(coachesQuery(slug))
  const clinics = useQuery(clinicsQuery(slug))
  const payments = useQuery(paymentsQuery(slug))
  const { error, retry } = together(academy, venues, coaches, clinics)
  if (error) {
    return <ErrorState sentence={sentenceOf(error)} onRetry={retry} />
  }
  if (!academy.data || !venues.data || !coaches.data || !clinics.data || !session?.account) {
    return <SkeletonRows rows={5} />
  }
  const { account } = session
  const [venue] = venues.data.venues
  const [clinic] = clinics.data.clinics
  const hasCoach = coaches.data.coaches.length > 0
  const choices = { venues: venues.data.venues, coaches: coaches.data.coaches }
  const names = choices.coaches.map(({ name }) => name).join(', ')
  return (
    <OpeningSteps
      academy={academy.data}
      venue={{
        isDone: venue !== undefined && venue.areas.length > 0 && hasCoach,
        now: () => <FirstVenue slug={slug} me={account} kept={{ venue, hasCoach }} />,
        done: (
          <p className="say sm">
            At {venue?.name}, with {names}.
          </p>
        ),
      }}
      clinic={{
        isDone: clinic !== undefined,
        now: (onLater) => <FirstClinic academy={academy.data} {...choices} onLater={onLater} />,
        done: <p className="say sm">{clinic?.title}.</p>,
      }}
      payment={{
        isDone: payments.data?.state === 'ready',
        now: (onLater) => (
          <>
            <ConnectPayments slug={slug} mayConnect kind="go" />
            <Button kind="quiet" onClick={onLater}>
              Do this later
            </Button>
          </>
        ),
        done: <ConnectPayments slug={slug} mayConnect kind="go" />,
      }}
    />
  )
}
