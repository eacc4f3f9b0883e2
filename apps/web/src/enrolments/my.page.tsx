import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query'
import { Link, useParams, type LoaderFunctionArgs } from 'react-router'
import { makeFormat, type Format } from '../academies/format'
import { useSession } from '../accounts/queries'
import { VerifyReminder } from '../accounts/verify-reminder'
import { academyPageQuery, type AcademyFace } from '../clinics/queries'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { Notice } from '../ui/notice'
import { EmptyState } from '../ui/states'
import { useNow } from '../ui/use-now'
import { MyWaitlist } from './my-waitlist'
import { myPlacesQuery, type Enrolment, type MyPlaces, type PlaceOfEnrolment } from './queries'

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
  const now = useNow()
  useTitle(`Your golf – ${page.academy.name}`)
  const format = makeFormat(page.academy)
  const next = upcoming(mine, now).slice(0, SHOWN_AHEAD)
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
          {next.map((each) => (
            <NextSession key={each.place.id} {...each} academy={page.academy} />
          ))}
        </ul>
      )}
      <MyWaitlist mine={mine} slug={slug} format={format} />
    </main>
  )
}

/** A session ahead, at the venue's own time. */
function NextSession(props: {
  enrolment: Enrolment
  place: PlaceOfEnrolment
  academy: AcademyFace
}) {
  const { enrolment, place, academy } = props
  const { clinic, golfer } = enrolment
  const format = makeFormat({ ...academy, zone: clinic.zone })
  return (
    <li>
      <div className="day">
        {format.day(place.startsAt)}
        <small>{format.range(place)}</small>
      </div>
      <div className="mid">
        <h3>
          <Link to={paths.myPlace(academy.slug, enrolment.id)}>{clinic.title}</Link>
        </h3>
        <p>{[place.areas.join(' and '), clinic.venueName].filter(Boolean).join(', ')}</p>
      </div>
      <div className="pl">
        {golfer.isMe ? 'You' : golfer.name}
        <div className="soft">{clinic.bring && `Bring: ${clinic.bring}`}</div>
      </div>
    </li>
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
          {enrolment.heldUntil &&
            makeFormat({ ...format, zone: enrolment.clinic.zone }).time(enrolment.heldUntil)}
          .
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
