import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query'
import { Link, useParams, type LoaderFunctionArgs } from 'react-router'
import { levelInWords, makeFormat, taxInWords, type Format } from '../academies/format'
import { TakePlace } from '../enrolments/take-place'
import { useAccent, useTitle } from '../layouts/accent'
import { PublicBar } from '../layouts/public-bar'
import { PublicFoot } from '../layouts/public-foot'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { Facts } from '../ui/facts'
import { Initials } from '../ui/initials'
import { PlaceTicks } from '../ui/place-ticks'
import { clinicPageQuery, type ClinicPage } from './queries'
import { refundInWords } from './refund-words'
import { SessionCard } from './session-card'

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) =>
    client.query({
      ...clinicPageQuery(params['academy'] ?? '', params['clinic'] ?? ''),
      staleTime: 'static',
    })

export default function ClinicPageView() {
  const { academy: slug = '', clinic: clinicSlug = '' } = useParams()
  const { data: page } = useSuspenseQuery(clinicPageQuery(slug, clinicSlug))
  const { academy, clinic } = page
  const format = makeFormat({ ...academy, zone: clinic.zone })
  useAccent(academy)
  useTitle(`${clinic.title} – ${academy.name}`)
  return (
    <>
      <PublicBar academy={academy} />
      <main id="main" className="wrap public">
        <div className="cols">
          <div>
            <p className="crumb mt-7">
              <Link to={paths.academy(slug)}>All clinics</Link>
            </p>
            <h1>{clinic.title}</h1>
            <p className="lead mt-4 mb-6 max-w-[46ch]">{clinic.about || clinic.summary}</p>
            <a className={`${buttonClass({ isBig: true })} onhand mb-5`} href="#take-a-place">
              Take a place
            </a>
            <Facts facts={factsOf(page, format)} />
            <h2 className="mt-7 mb-2 text-title">{headOfDates(clinic)}</h2>
            <SessionCard sessions={clinic.sessions} format={format} />
          </div>
          <TakePlace page={page} format={format} />
        </div>
      </main>
      <PublicFoot>{[academy.name, academy.address].filter(Boolean).join(', ')}</PublicFoot>
    </>
  )
}

function headOfDates({ sessions }: ClinicPage['clinic']): string {
  return sessions.length === 1 ? 'The session' : `The ${sessions.length} sessions`
}

function factsOf({ academy, clinic }: ClinicPage, format: Format) {
  const { venue } = clinic
  const elsewhere = format.zoneIfElsewhere(clinic.startsAt)
  return [
    ['When', [whenInWords(clinic, format), elsewhere].filter(Boolean).join(', ')],
    ['Where', [clinic.areas.join(' and '), venue.name, venue.address].filter(Boolean).join(', ')],
    [
      clinic.coachDetails.length === 1 ? 'Coach' : 'Coaches',
      clinic.coachDetails.map((coach) => (
        <div key={coach.name}>
          <Initials of={coach.initials} /> {coach.name}
        </div>
      )),
    ],
    ['Bring', clinic.bring],
    ['For', levelInWords(clinic)],
    ['Price', priceInWords({ academy, clinic }, format)],
    [
      'Places',
      <>
        <PlaceTicks taken={clinic.taken} capacity={clinic.capacity} /> {clinic.taken} of{' '}
        {clinic.capacity} taken
      </>,
    ],
    ['If it blows', 'A session we call off is owed to you: credit or your money back. You choose.'],
    ['If you give up', refundInWords(academy)],
    ['Juniors', clinic.ageMax !== null && clinic.ageMax < 18 ? academy.safeguarding : ''],
    ['Take care', 'Pain means stop, and see a clinician. When the siren sounds, leave the grass.'],
  ] as const
}

function whenInWords({ sessions, recurrence }: ClinicPage['clinic'], format: Format): string {
  const [first] = sessions
  const last = sessions.at(-1)
  if (!first || !last) return ''
  if (sessions.length === 1) return format.session(first)
  return (
    `${recurrence}, ${format.range(first)}, from ${format.day(first.startsAt, 'long')} ` +
    `to ${format.day(last.startsAt, 'long')}`
  )
}

function priceInWords({ academy, clinic }: ClinicPage, format: Format): string {
  if (clinic.payMode === 'free') return 'Free'
  const parts = [
    clinic.runPriceMinor !== null && clinic.saleMode !== 'drop-in'
      ? `${format.money(clinic.runPriceMinor)} for ${clinic.sessionsAhead === clinic.sessionsTotal ? 'the run' : 'the sessions left'}`
      : '',
    clinic.dropInPriceMinor !== null && clinic.saleMode !== 'run'
      ? `${format.money(clinic.dropInPriceMinor)} for one session`
      : '',
    taxInWords(academy),
  ]
  return parts.filter(Boolean).join(', ')
}
