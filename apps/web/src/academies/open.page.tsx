import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, useNavigate, useSearchParams } from 'react-router'
import { useSession } from '../accounts/queries'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { sentenceOf } from '../api/problem'
import { ConnectPayments } from '../checkout/connect-payments'
import { paymentsQuery } from '../checkout/queries'
import { FirstClinic } from '../clinics/first-clinic'
import { clinicsQuery } from '../clinics/queries'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { Button, buttonClass } from '../ui/button'
import { Drawing } from '../ui/drawing'
import { Initials, initialsOf } from '../ui/initials'
import { Notice } from '../ui/notice'
import { OpeningList, OpeningStep, type StepState } from '../ui/opening-list'
import { SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'
import { FirstVenue } from '../venues/first-venue'
import { OpenAcademy } from './open-academy'
import { academyQuery, coachesQuery, venuesQuery } from './queries'

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
          <OpeningSteps slug={slug} />
        ) : (
          <OpeningList>
            <OpeningStep number={1} label="Who you are" state="now">
              <OpenAcademy onOpened={(academy) => setQuery({ academy }, { replace: true })} />
            </OpeningStep>
            {LATER.map(({ label, about }, index) => (
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

const LATER = [
  { label: 'Where you teach', about: 'A venue, one area of it, and who teaches there.' },
  {
    label: 'Your first clinic',
    about: 'When, where and for how many, with every date and its light.',
  },
  {
    label: 'How you are paid',
    about:
      'You connect the payment provider on its own page. Until then golfers can pay at the desk. About a minute.',
  },
  { label: 'Your page', about: 'You read it once as a golfer sees it, and put it live.' },
] as const

function OpeningSteps({ slug }: { slug: string }) {
  const navigate = useNavigate()
  const { data: session } = useSession()
  const academy = useQuery(academyQuery(slug))
  const venues = useQuery(venuesQuery(slug))
  const coaches = useQuery(coachesQuery(slug))
  const clinics = useQuery(clinicsQuery(slug))
  const payments = useQuery(paymentsQuery(slug))
  const [later, setLater] = useState<readonly number[]>([])
  const publish = useAcademyMutation(slug, () =>
    call('academies.publish', { academy: slug, body: { isPublished: true } }),
  )
  const error = academy.error ?? venues.error ?? coaches.error ?? clinics.error
  if (error) return <Notice kind="flag">{sentenceOf(error)}</Notice>
  if (!academy.data || !venues.data || !coaches.data || !clinics.data || !session?.account) {
    return <SkeletonRows rows={5} />
  }
  const [venue] = venues.data.venues
  const [clinic] = clinics.data.clinics
  const hasCoach = coaches.data.coaches.length > 0
  const isDone = [
    true,
    venue !== undefined && venue.areas.length > 0 && hasCoach,
    clinic !== undefined || later.includes(3),
    payments.data?.state === 'ready' || later.includes(4),
    academy.data.publishedAt !== null,
  ]
  const now = isDone.indexOf(false) + 1
  const stateOf = (step: number): StepState => {
    if (step === now) return 'now'
    return isDone[step - 1] ? 'done' : 'next'
  }
  const putLive = () =>
    publish.mutate(undefined, {
      onSuccess: () => {
        toast('Your page is live.')
        void navigate(paths.week(slug))
      },
    })
  return (
    <OpeningList>
      <OpeningStep number={1} label="Who you are" state="done">
        <p className="say sm">
          We are {academy.data.name} in {academy.data.place}. Our page is {location.host}/{slug}.
        </p>
      </OpeningStep>
      <OpeningStep number={2} label={LATER[0].label} state={stateOf(2)}>
        {now === 2 ? (
          <FirstVenue slug={slug} me={session.account} kept={{ venue, hasCoach }} />
        ) : (
          <p className="say sm">
            At {venue?.name}, with {coaches.data.coaches.map(({ name }) => name).join(', ')}.
          </p>
        )}
      </OpeningStep>
      <OpeningStep number={3} label={LATER[1].label} state={stateOf(3)}>
        {now === 3 && (
          <FirstClinic
            academy={academy.data}
            venues={venues.data.venues}
            coaches={coaches.data.coaches}
            onLater={() => setLater((had) => [...had, 3])}
          />
        )}
        {now < 3 && <p className="soft">{LATER[1].about}</p>}
        {now > 3 && <p className="say sm">{clinic ? `${clinic.title}.` : 'Left for later.'}</p>}
      </OpeningStep>
      <OpeningStep number={4} label={LATER[2].label} state={stateOf(4)}>
        {now < 4 && <p className="soft">{LATER[2].about}</p>}
        {now > 4 && payments.data?.state !== 'ready' && <p className="say sm">Left for later.</p>}
        {(now === 4 || (now > 4 && payments.data?.state === 'ready')) && (
          <ConnectPayments slug={slug} mayConnect kind="go" />
        )}
        {now === 4 && (
          <Button kind="quiet" onClick={() => setLater((had) => [...had, 4])}>
            Do this later
          </Button>
        )}
      </OpeningStep>
      <OpeningStep number={5} label={LATER[3].label} state={stateOf(5)}>
        {now === 5 ? (
          <>
            <p className="mb-3">
              <Link to={paths.academy(slug)} target="_blank">
                Read it as a golfer sees it
              </Link>
              , in a page of its own. Then put it live.
            </p>
            <Button
              kind="go"
              isBig
              waiting={publish.isPending && 'Putting it live…'}
              onClick={putLive}
            >
              Put it live
            </Button>
          </>
        ) : (
          <p className="soft">{LATER[3].about}</p>
        )}
        {now === 0 && (
          <Link className={buttonClass()} to={paths.week(slug)}>
            Go to the week board
          </Link>
        )}
      </OpeningStep>
    </OpeningList>
  )
}
