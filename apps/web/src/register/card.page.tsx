import { useQuery, type QueryClient } from '@tanstack/react-query'
import { lazy, Suspense, useState } from 'react'
import { useParams, type LoaderFunctionArgs } from 'react-router'
import { makeFormat } from '../academies/format'
import { academyQuery } from '../academies/queries'
import { sentenceOf } from '../api/problem'
import { together } from '../api/together'
import { clinicQuery, type Session } from '../clinics/queries'
import { EnrolledGolfers } from '../enrolments/enrolled-golfers'
import { useTitle } from '../layouts/accent'
import { useMay } from '../layouts/staff.layout'
import { Bill } from '../ui/facts'
import { MarkKey } from '../ui/mark'
import { ErrorState, SkeletonRows } from '../ui/states'
import { AttendanceCard } from './attendance-card'
import { CardHead } from './card-head'
import { cardQuery } from './queries'

const SessionDialog = lazy(() =>
  import('../clinics/session-dialog').then(({ SessionDialog: Sheet }) => ({ default: Sheet })),
)

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) => {
    const { academy = '', clinicId = '' } = params
    void client.query(clinicQuery(academy, clinicId)).catch(() => undefined)
    void client.query(cardQuery(academy, clinicId)).catch(() => undefined)
    void client.query(academyQuery(academy)).catch(() => undefined)
    return null
  }

/** A clinic's card: golfers down, sessions across, and the money on it. */
export default function CardPage() {
  const { academy: slug = '', clinicId = '' } = useParams()
  const may = useMay()
  const clinic = useQuery(clinicQuery(slug, clinicId))
  const card = useQuery(cardQuery(slug, clinicId))
  const academy = useQuery(academyQuery(slug))
  const [chosen, setChosen] = useState<Session | null>(null)
  useTitle(clinic.data?.title)
  const { error, retry } = together(clinic, card, academy)
  if (error) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(error)} onRetry={retry} />
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
  const format = makeFormat({ ...academy.data, zone: clinic.data.zone })
  const { money, rows } = card.data
  return (
    <main id="main" className="wrap">
      <CardHead academy={slug} clinic={clinic.data} format={format} />
      <AttendanceCard
        sessions={clinic.data.sessions}
        rows={rows}
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
            session={chosen}
            format={format}
            onClose={() => setChosen(null)}
          />
        </Suspense>
      )}
    </main>
  )
}
