import { useQuery, useQueryClient } from '@tanstack/react-query'
import { useEffect } from 'react'
import { Link, Navigate, useParams, useSearchParams } from 'react-router'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { sentenceOf } from '../api/problem'
import { ConnectPayments } from '../checkout/connect-payments'
import { paymentsQuery } from '../checkout/queries'
import { CoachSection } from '../coaches/coach-section'
import { useTitle } from '../layouts/accent'
import { useMay } from '../layouts/staff.layout'
import { paths } from '../paths'
import { Button, buttonClass } from '../ui/button'
import { PageHead } from '../ui/page-head'
import { ErrorState, SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'
import { VenueSection } from '../venues/venue-section'
import { PageForm } from './page-form'
import { PolicyForm } from './policy-form'
import { academyQuery, coachesQuery, venuesQuery } from './queries'
import { StaffSection } from './staff-section'

/** Everything an academy is made of before there is a clinic. */
export default function SetUpPage() {
  const { academy: slug = '' } = useParams()
  const [query] = useSearchParams()
  const client = useQueryClient()
  const may = useMay()
  const academy = useQuery(academyQuery(slug))
  const venues = useQuery(venuesQuery(slug))
  const coaches = useQuery(coachesQuery(slug))
  useTitle(`Set-up – ${academy.data?.name ?? 'Marram'}`)
  const isBack = query.has('payments')
  useEffect(() => {
    // The provider's page changed what the answer was; what was read before is out of date.
    if (isBack) void client.invalidateQueries({ queryKey: paymentsQuery(slug).queryKey })
  }, [client, isBack, slug])
  const publish = useAcademyMutation(slug, (isPublished: boolean) =>
    call('academies.publish', { academy: slug, body: { isPublished } }),
  )
  const error = academy.error ?? venues.error ?? coaches.error
  if (error) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(error)} onRetry={() => void academy.refetch()} />
      </main>
    )
  }
  if (!academy.data || !venues.data || !coaches.data) {
    return (
      <main id="main" className="wrap py-8">
        <SkeletonRows rows={8} />
      </main>
    )
  }
  const { publishedAt, name } = academy.data
  const isLive = publishedAt !== null
  // Whoever is still opening the academy goes on there.
  if (isBack && !isLive) return <Navigate to={`${paths.open()}?academy=${slug}`} replace />
  return (
    <main id="main" className="wrap">
      <PageHead
        title="Set-up"
        sub={
          isLive
            ? `${name} is on its page: golfers can find it.`
            : `${name} is not on its page yet: nobody but staff sees it.`
        }
        actions={
          <>
            <Link className={buttonClass()} to={paths.academy(slug)}>
              See the page
            </Link>
            {may('academy:change') && (
              <Button
                kind={isLive ? 'plain' : 'go'}
                onClick={() =>
                  publish.mutate(!isLive, {
                    onSuccess: () => toast(isLive ? 'Taken off the page.' : 'Your page is live.'),
                  })
                }
              >
                {isLive ? 'Take the page down' : 'Put it live'}
              </Button>
            )}
          </>
        }
      />
      <VenueSection slug={slug} venues={venues.data.venues} mayChange={may('venues:change')} />
      <CoachSection slug={slug} coaches={coaches.data.coaches} mayChange={may('coaches:change')} />
      {may('staff:manage') && <StaffSection slug={slug} academy={academy.data} />}
      {may('academy:change') && (
        <>
          <section aria-labelledby="payments">
            <div className="sect mb-4">
              <h2 id="payments">Payments</h2>
            </div>
            <ConnectPayments slug={slug} mayConnect={may('payments:connect')} kind="plain" />
          </section>
          <PageForm key={`page-${name}`} academy={academy.data} />
          <PolicyForm academy={academy.data} />
        </>
      )}
    </main>
  )
}
