import { useQuery, type QueryClient } from '@tanstack/react-query'
import { Link, useParams, type LoaderFunctionArgs } from 'react-router'
import { makeFormat, type Format } from '../academies/format'
import { academyQuery } from '../academies/queries'
import { sentenceOf } from '../api/problem'
import { together } from '../api/together'
import { PlacesOfGolfer } from '../checkout/places-of-golfer'
import { GivePlace } from '../enrolments/give-place'
import { useTitle } from '../layouts/accent'
import { useMay } from '../layouts/staff.layout'
import { paths } from '../paths'
import { Facts } from '../ui/facts'
import { PageHead } from '../ui/page-head'
import { ErrorState, SkeletonRows } from '../ui/states'
import { golferQuery, type Golfer } from './queries'

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) => {
    const slug = params['academy'] ?? ''
    return Promise.allSettled([
      client.query(golferQuery(slug, params['golferId'] ?? '')),
      client.query(academyQuery(slug)),
    ])
  }

/** One golfer for staff: who to call, what they have, and a place for them. */
export default function GolferPage() {
  const { academy: slug = '', golferId = '' } = useParams()
  const may = useMay()
  const golfer = useQuery(golferQuery(slug, golferId))
  const academy = useQuery(academyQuery(slug))
  useTitle(golfer.data?.name)
  const { error, retry } = together(golfer, academy)
  if (error) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(error)} onRetry={retry} />
      </main>
    )
  }
  if (!golfer.data || !academy.data) {
    return (
      <main id="main" className="wrap py-8">
        <SkeletonRows rows={6} />
      </main>
    )
  }
  const format = makeFormat(academy.data)
  return (
    <main id="main" className="wrap">
      <PageHead
        crumb={<Link to={paths.golfers(slug)}>Golfers</Link>}
        title={golfer.data.name}
        sub={inOneLine(golfer.data)}
      />
      <div className="kcols">
        <div>
          <Facts facts={factsOf(golfer.data, format)} />
          {golfer.data.isJunior && (
            <p className="note soft mt-2">
              {golfer.data.hasContacts
                ? 'Looking at a junior’s contacts is written down with your name.'
                : 'A junior’s contacts and consents are shown to their coach in the week before and after a session.'}
            </p>
          )}
          {may('places:change') && (
            <GivePlace key={golferId} academy={slug} golferId={golferId} format={format} />
          )}
        </div>
        {may('places:change') && (
          <PlacesOfGolfer academy={slug} golferId={golferId} format={format} />
        )}
      </div>
    </main>
  )
}

function inOneLine({ isJunior, ageYears, handicap, hand }: Golfer): string {
  const parts = [
    isJunior ? 'Junior' : '',
    ageYears === null ? '' : `${ageYears} years`,
    handicap === null ? 'no handicap' : `handicap ${handicap}`,
    hand === 'left' ? 'left-handed' : '',
  ]
  return parts.filter(Boolean).join(', ')
}

function factsOf(golfer: Golfer, format: Format) {
  const { email, guardianName, emergencyContact: contact, consents, creditMinor } = golfer
  const given = consents.map(
    ({ kind, givenBy, givenAt }) =>
      `${consentInWords(kind)} by ${givenBy}, ${format.day(givenAt, 'year')}`,
  )
  return [
    ['E-mail', email ?? ''],
    ['Guardian', guardianName ?? ''],
    ['Who to call', contact ? `${contact.name}, ${contact.phone}` : ''],
    ['Consents', given.join('; ')],
    ['Notes', golfer.notes],
    ['Credit', creditMinor > 0 ? format.money(creditMinor) : ''],
  ] as const
}

function consentInWords(kind: string): string {
  return { 'takes-part': 'Takes part', waiver: 'Terms', photo: 'Photos' }[kind] ?? kind
}
