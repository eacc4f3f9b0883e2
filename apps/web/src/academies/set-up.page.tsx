import { useQuery, useQueryClient, type QueryClient } from '@tanstack/react-query'
import { useEffect } from 'react'
import { Link, Navigate, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router'
import { sentenceOf } from '../api/problem'
import { together } from '../api/together'
import { ConnectPayments } from '../checkout/connect-payments'
import { paymentsQuery } from '../checkout/queries'
import { CoachSection } from '../coaches/coach-section'
import { coachesQuery } from '../coaches/queries'
import { useTitle } from '../layouts/accent'
import { useMay } from '../layouts/staff.layout'
import { paths } from '../paths'
import { Button, buttonClass } from '../ui/button'
import { Notice } from '../ui/notice'
import { PageHead } from '../ui/page-head'
import { ErrorState, SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'
import { venuesQuery } from '../venues/queries'
import { VenueSection } from '../venues/venue-section'
import { PageForm } from './page-form'
import { PolicyForm } from './policy-form'
import { academyQuery, usePublishAcademy, type Academy } from './queries'
import { StaffSection } from './staff-section'

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) => {
    const slug = params['academy'] ?? ''
    return Promise.allSettled([
      client.query(academyQuery(slug)),
      client.query(venuesQuery(slug)),
      client.query(coachesQuery(slug)),
    ])
  }

/** Everything an academy is made of before there is a clinic. */
export default function SetUpPage() {
  const { academy: slug = '' } = useParams()
  const may = useMay()
  const academy = useQuery(academyQuery(slug))
  const venues = useQuery(venuesQuery(slug))
  const coaches = useQuery(coachesQuery(slug))
  useTitle(`Set-up – ${academy.data?.name ?? 'Marram'}`)
  const isBack = useBackFromProvider(slug)
  const { error, retry } = together(academy, venues, coaches)
  if (error) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(error)} onRetry={retry} />
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
  // Whoever is still opening the academy goes on there.
  if (isBack && academy.data.publishedAt === null) return <Navigate to={paths.open(slug)} replace />
  return (
    <main id="main" className="wrap">
      <SetUpHead academy={academy.data} mayPublish={may('academy:change')} />
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
          <PageForm key={`page-${slug}`} academy={academy.data} />
          <PolicyForm key={`policies-${slug}`} academy={academy.data} />
        </>
      )}
    </main>
  )
}

/** Whether the provider's page led back here; what was read of payments before is out of date then. */
function useBackFromProvider(slug: string): boolean {
  const [query] = useSearchParams()
  const client = useQueryClient()
  const isBack = query.has('payments')
  useEffect(() => {
    if (isBack) void client.invalidateQueries({ queryKey: paymentsQuery(slug).queryKey })
  }, [client, isBack, slug])
  return isBack
}

/** Whether golfers find the academy, and the press that changes it. */
function SetUpHead({ academy, mayPublish }: { academy: Academy; mayPublish: boolean }) {
  const { slug, name, publishedAt } = academy
  const isLive = publishedAt !== null
  const publish = usePublishAcademy(slug)
  const press = () =>
    publish.mutate(
      { isPublished: !isLive },
      { onSuccess: () => toast(isLive ? 'Taken off the page.' : 'Your page is live.') },
    )
  return (
    <>
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
            {mayPublish && (
              <Button
                kind={isLive ? 'plain' : 'go'}
                waiting={publish.isPending && (isLive ? 'Taking it down…' : 'Putting it live…')}
                onClick={press}
              >
                {isLive ? 'Take the page down' : 'Put it live'}
              </Button>
            )}
          </>
        }
      />
      {publish.error && (
        <div className="mb-4">
          <Notice kind="flag">{sentenceOf(publish.error)}</Notice>
        </div>
      )}
    </>
  )
}
