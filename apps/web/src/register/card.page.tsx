import { useQuery } from '@tanstack/react-query'
import { lazy, Suspense, useState } from 'react'
import { Link, useParams } from 'react-router'
import { makeFormat } from '../academies/format'
import { academyQuery } from '../academies/queries'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { sentenceOf } from '../api/problem'
import { cardQuery, clinicQuery, type Session } from '../clinics/queries'
import { useTitle } from '../layouts/accent'
import { useMay } from '../layouts/staff.layout'
import { paths } from '../paths'
import { Button, buttonClass } from '../ui/button'
import { Bill } from '../ui/facts'
import { Initials } from '../ui/initials'
import { MarkKey } from '../ui/mark'
import { Notice } from '../ui/notice'
import { PageHead } from '../ui/page-head'
import { ErrorState, SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'
import { AttendanceCard } from './attendance-card'
import { EnrolledGolfers } from '../enrolments/enrolled-golfers'

const SessionDialog = lazy(() =>
  import('../clinics/session-dialog').then(({ SessionDialog: Sheet }) => ({ default: Sheet })),
)

/** A clinic's card: golfers down, sessions across, and the money on it. */
export default function CardPage() {
  const { academy: slug = '', clinicId = '' } = useParams()
  const may = useMay()
  const clinic = useQuery(clinicQuery(slug, clinicId))
  const card = useQuery(cardQuery(slug, clinicId))
  const academy = useQuery(academyQuery(slug))
  const [chosen, setChosen] = useState<Session | null>(null)
  const publish = useAcademyMutation(slug, (isPublished: boolean) =>
    call('clinics.publish', { academy: slug, params: { clinicId }, body: { isPublished } }),
  )
  useTitle(clinic.data?.title)
  const error = clinic.error ?? card.error ?? academy.error
  if (error) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(error)} onRetry={() => void clinic.refetch()} />
      </main>
    )
  }
  if (!clinic.data || !card.data || !academy.data) {
    return (
      <main id="main" className="wrap py-8">
        <SkeletonRows rows={8} />
      </main>
    )
  }
  const { title, recurrence, sessions, state, coaches, venueName, zone } = clinic.data
  const format = makeFormat({ ...academy.data, zone })
  const [first] = sessions
  const last = sessions.at(-1)
  const { money } = card.data
  return (
    <main id="main" className="wrap">
      <PageHead
        crumb={<Link to={paths.clinics(slug)}>Clinics</Link>}
        title={title}
        sub={
          <>
            {recurrence}
            {first && `, ${format.range(first)}`}
            {first &&
              last &&
              `, ${format.day(first.startsAt, 'long')} to ${format.day(last.startsAt, 'long')}`}
            . {venueName}.{' '}
            {coaches.map((coach) => (
              <span key={coach.id} className="nowrap">
                <Initials of={coach.initials} /> {coach.name}{' '}
              </span>
            ))}
          </>
        }
        actions={
          may('clinics:write') && (
            <>
              <Link className={buttonClass()} to={paths.changeClinic(slug, clinicId)}>
                Change clinic
              </Link>
              <Button
                kind={state === 'published' ? 'plain' : 'go'}
                waiting={publish.isPending && 'One moment…'}
                onClick={() =>
                  publish.mutate(state !== 'published', {
                    onSuccess: () =>
                      toast(state === 'published' ? 'Taken off the page.' : 'On the page now.'),
                  })
                }
              >
                {state === 'published' ? 'Take off the page' : 'Put on the page'}
              </Button>
            </>
          )
        }
      />
      {publish.error && <Notice kind="flag">{sentenceOf(publish.error)}</Notice>}
      <AttendanceCard
        sessions={sessions}
        rows={card.data.rows}
        format={format}
        {...(may('sessions:change') ? { onSession: setChosen } : {})}
      />
      <div className="my-3">
        <MarkKey />
      </div>
      <div className="kcols">
        <EnrolledGolfers academy={slug} clinicId={clinicId} format={format} />
        {money && (
          <section>
            <div className="sh">
              <h2>Money on this card</h2>
            </div>
            <Bill
              lines={[
                ['Paid in or owed, with tax', format.money(money.paidMinor)],
                ['Of which tax owed', format.money(money.taxMinor)],
                ['Earned, net of tax', format.money(money.earnedMinor)],
                ['Still to be earned, net', format.money(money.toEarnMinor)],
              ]}
            />
          </section>
        )}
      </div>
      {chosen && (
        <Suspense>
          <SessionDialog
            academy={slug}
            clinicId={clinicId}
            session={chosen}
            format={format}
            onClose={() => setChosen(null)}
          />
        </Suspense>
      )}
    </main>
  )
}
