import { useQuery, useSuspenseQuery, type QueryClient } from '@tanstack/react-query'
import { Link, useParams, type LoaderFunctionArgs } from 'react-router'
import { makeFormat, type Format } from '../academies/format'
import { useSession } from '../accounts/queries'
import { VerifyReminder } from '../accounts/verify-reminder'
import { academyPageQuery } from '../clinics/queries'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { Button, buttonClass } from '../ui/button'
import { Notice } from '../ui/notice'
import { EmptyState } from '../ui/states'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { myPlacesQuery, type Enrolment, type MyPlaces } from './queries'

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) => {
    const slug = params['academy'] ?? ''
    return Promise.all([
      client.query({ ...myPlacesQuery(slug), staleTime: 'static' }),
      client.query({ ...academyPageQuery(slug), staleTime: 'static' }),
    ])
  }

const SHOWN_AHEAD = 6

/** A golfer's today: what waits for a decision, then the sessions that come next. */
export default function MyPage() {
  const { academy: slug = '' } = useParams()
  const { data: mine } = useSuspenseQuery(myPlacesQuery(slug))
  const { data: page } = useSuspenseQuery(academyPageQuery(slug))
  const { data: session } = useSession()
  const now = useQuery({ queryKey: ['', 'now'], queryFn: () => Date.now(), staleTime: 60_000 }).data
  useTitle(`Your golf – ${page.academy.name}`)
  const format = makeFormat(page.academy)
  const next = upcoming(mine, now ?? 0).slice(0, SHOWN_AHEAD)
  return (
    <main id="main" className="wrap narrow">
      <div className="head">
        <h1>Hello {session?.account?.name.split(' ')[0]}</h1>
        {mine.creditMinor > 0 && (
          <p className="sub">You have {format.money(mine.creditMinor)} of credit here.</p>
        )}
      </div>
      <VerifyReminder />
      <Decisions mine={mine} slug={slug} format={format} />
      <h2 className="my-3">Next</h2>
      {next.length === 0 ? (
        <EmptyState
          action={
            <Link className={buttonClass({ kind: 'go' })} to={paths.academy(slug)}>
              See the clinics
            </Link>
          }
        >
          No session ahead. There may be a place in a clinic that fits.
        </EmptyState>
      ) : (
        <ul className="fix">
          {next.map(({ enrolment, place }) => (
            <li key={place.id}>
              <div className="day">
                {format.day(place.startsAt)}
                <small>{format.range(place)}</small>
              </div>
              <div className="mid">
                <h3>
                  <Link to={paths.myPlace(slug, enrolment.id)}>{enrolment.clinic.title}</Link>
                </h3>
                <p>
                  {[place.areas.join(' and '), enrolment.clinic.venueName]
                    .filter(Boolean)
                    .join(', ')}
                </p>
              </div>
              <div className="pl">
                {enrolment.golfer.isMe ? 'You' : enrolment.golfer.name}
                <div className="soft">
                  {enrolment.clinic.bring && `Bring: ${enrolment.clinic.bring}`}
                </div>
              </div>
            </li>
          ))}
        </ul>
      )}
      <Waiting mine={mine} slug={slug} format={format} />
    </main>
  )
}

function upcoming({ enrolments }: MyPlaces, now: number) {
  return enrolments
    .flatMap((enrolment) => enrolment.places.map((place) => ({ enrolment, place })))
    .filter(
      ({ place }) =>
        place.state === 'confirmed' && !place.isCalledOff && Date.parse(place.endsAt) > now,
    )
    .sort((a, b) => Date.parse(a.place.startsAt) - Date.parse(b.place.startsAt))
}

/** Holds to be paid, offers to be taken, and called-off places to be decided on. */
function Decisions({ mine, slug, format }: { mine: MyPlaces; slug: string; format: Format }) {
  const held = mine.enrolments.filter(({ state }) => state === 'held')
  const owed = mine.enrolments.filter(({ places }) => places.some(isUndecided))
  return (
    <div className="grid gap-3 mb-6">
      {held.map((enrolment) => (
        <Notice key={enrolment.id} action={<GoTo enrolment={enrolment} slug={slug} label="Pay" />}>
          <b>{enrolment.clinic.title}</b> is held for {enrolment.golfer.name} until{' '}
          {enrolment.heldUntil && format.time(enrolment.heldUntil)}.
        </Notice>
      ))}
      {owed.map((enrolment) => (
        <Notice
          key={enrolment.id}
          drawing="wind"
          action={<GoTo enrolment={enrolment} slug={slug} label="Choose" />}
        >
          A session of <b>{enrolment.clinic.title}</b> was called off. Credit or money back: you
          choose.
        </Notice>
      ))}
    </div>
  )
}

const isUndecided = ({ owed }: Enrolment['places'][number]): boolean =>
  owed !== null && owed.choice === null

function GoTo({ enrolment, slug, label }: { enrolment: Enrolment; slug: string; label: string }) {
  return (
    <Link className={buttonClass()} to={paths.myPlace(slug, enrolment.id)}>
      {label}
    </Link>
  )
}

function Waiting({ mine, slug, format }: { mine: MyPlaces; slug: string; format: Format }) {
  const leave = useAcademyMutation(slug, (entryId: string) =>
    call('waitlist.leave', { academy: slug, params: { entryId } }),
  )
  const waiting = mine.waitlist.filter(({ state }) => state === 'waiting')
  if (waiting.length === 0) return null
  return (
    <section>
      <h2 className="mt-8 mb-3">Waiting for a place</h2>
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
              waiting={leave.isPending && 'Leaving…'}
              onClick={() => leave.mutate(entry.id)}
            >
              Leave
            </Button>
          </li>
        ))}
      </ul>
    </section>
  )
}
