import { useQuery, type QueryClient } from '@tanstack/react-query'
import { Link, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router'
import { makeFormat, type Format } from '../academies/format'
import { sentenceOf } from '../api/problem'
import { academyPageQuery, type AcademyFace } from '../clinics/queries'
import { enrolmentQuery, type Enrolment } from '../enrolments/queries'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { ErrorState, SkeletonRows } from '../ui/states'
import { BeforeYouPay } from './before-you-pay'
import { ConfirmedPlace } from './confirmed-place'
import { EndedPlace } from './ended-place'
import { nextLookMs } from './next-look'

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) => {
    const slug = params['academy'] ?? ''
    return Promise.all([
      client.query({ ...academyPageQuery(slug), staleTime: 'static' }),
      client.query(enrolmentQuery(slug, params['enrolmentId'] ?? '')).catch(() => undefined),
    ])
  }

/** One place, however it stands: to be paid, paid, declined, run out, given up. */
export default function PlacePage() {
  const { academy: slug = '', enrolmentId = '' } = useParams()
  const [query] = useSearchParams()
  const isBack = query.get('from') === 'payment'
  const { data: page } = useQuery(academyPageQuery(slug))
  const place = useQuery({
    ...enrolmentQuery(slug, enrolmentId),
    refetchInterval: ({ state }) => nextLookMs(state.data, { isBack, nowMs: Date.now() }),
  })
  useTitle(place.data?.clinic.title)
  if (!page || place.isPending) {
    return (
      <main id="main" className="wrap narrow py-10">
        <SkeletonRows />
      </main>
    )
  }
  if (place.isError) {
    return (
      <main id="main" className="wrap narrow py-10">
        <ErrorState sentence={sentenceOf(place.error)} onRetry={() => void place.refetch()} />
      </main>
    )
  }
  const format = makeFormat({ ...page.academy, zone: place.data.clinic.zone })
  return (
    <main id="main" className="wrap narrow">
      <p className="crumb mt-7">
        <Link to={paths.myPlaces(slug)}>All your places</Link>
      </p>
      <Standing enrolment={place.data} academy={page.academy} format={format} isBack={isBack} />
    </main>
  )
}

function Standing(props: {
  enrolment: Enrolment
  academy: AcademyFace
  format: Format
  isBack: boolean
}) {
  switch (props.enrolment.state) {
    case 'held':
      return <BeforeYouPay {...props} />
    case 'confirmed':
      return <ConfirmedPlace {...props} />
    case 'cancelled':
      return <EndedPlace {...props} />
  }
}
