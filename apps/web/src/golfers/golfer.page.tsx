import { useQuery } from '@tanstack/react-query'
import { Link, useParams } from 'react-router'
import { makeFormat } from '../academies/format'
import { academyQuery } from '../academies/queries'
import { routeQuery } from '../api/query'
import { sentenceOf } from '../api/problem'
import { GivePlace } from '../enrolments/give-place'
import { PlacesOfGolfer } from '../checkout/places-of-golfer'
import { useTitle } from '../layouts/accent'
import { useMay } from '../layouts/staff.layout'
import { paths } from '../paths'
import { Facts } from '../ui/facts'
import { PageHead } from '../ui/page-head'
import { ErrorState, SkeletonRows } from '../ui/states'

/** One golfer for staff: who to call, what they have, and a place for them. */
export default function GolferPage() {
  const { academy: slug = '', golferId = '' } = useParams()
  const may = useMay()
  const golfer = useQuery(routeQuery('golfers.read', { academy: slug, params: { golferId } }))
  const academy = useQuery(academyQuery(slug))
  useTitle(golfer.data?.name)
  if (golfer.isError) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(golfer.error)} />
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
  const { name, email, isJunior, guardianName, handicap, hand, emergencyContact, consents } =
    golfer.data
  const format = makeFormat(academy.data)
  return (
    <main id="main" className="wrap">
      <PageHead
        crumb={<Link to={paths.golfers(slug)}>Golfers</Link>}
        title={name}
        sub={[
          isJunior ? 'Junior' : '',
          golfer.data.ageYears === null ? '' : `${golfer.data.ageYears} years`,
          handicap === null ? 'no handicap' : `handicap ${handicap}`,
          hand === 'left' ? 'left-handed' : '',
        ]
          .filter(Boolean)
          .join(', ')}
      />
      <div className="kcols">
        <div>
          <Facts
            facts={[
              ['E-mail', email ?? ''],
              ['Guardian', guardianName ?? ''],
              [
                'Who to call',
                emergencyContact ? `${emergencyContact.name}, ${emergencyContact.phone}` : '',
              ],
              [
                'Consents',
                consents
                  .map(
                    ({ kind, givenBy, givenAt }) =>
                      `${consentInWords(kind)} by ${givenBy}, ${format.day(givenAt, 'year')}`,
                  )
                  .join('; '),
              ],
              ['Notes', golfer.data.notes],
              ['Credit', golfer.data.creditMinor > 0 ? format.money(golfer.data.creditMinor) : ''],
            ]}
          />
          {isJunior && (
            <p className="note soft mt-2">
              {golfer.data.hasContacts
                ? 'Looking at a junior’s contacts is written down with your name.'
                : 'A junior’s contacts and consents are shown to their coach in the week before and after a session.'}
            </p>
          )}
          {may('places:change') && <GivePlace academy={slug} golferId={golferId} format={format} />}
        </div>
        {may('places:change') && (
          <PlacesOfGolfer academy={slug} golferId={golferId} format={format} />
        )}
      </div>
    </main>
  )
}

function consentInWords(kind: string): string {
  return { 'takes-part': 'Takes part', waiver: 'Terms', photo: 'Photos' }[kind] ?? kind
}
