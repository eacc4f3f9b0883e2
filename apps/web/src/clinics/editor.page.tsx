import { useQuery, type QueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, useNavigate, useParams, type LoaderFunctionArgs } from 'react-router'
import { todayIn } from '../academies/local-day'
import { academyQuery, type Academy } from '../academies/queries'
import { sentenceOf } from '../api/problem'
import { together } from '../api/together'
import { coachesQuery } from '../coaches/queries'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { PageHead } from '../ui/page-head'
import { EmptyState, ErrorState, SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'
import { venuesQuery } from '../venues/queries'
import { ClinicEditor } from './clinic-editor'
import { draftOf, newDraft, type Draft } from './draft'
import { clinicQuery, type Clinic } from './queries'
import { useSaveClinic } from './save-clinic'
import type { EditorChoices } from './sentence-part'
import { ThrowAway } from './throw-away'

export const loader =
  (client: QueryClient) =>
  ({ params }: LoaderFunctionArgs) => {
    const { academy = '', clinicId } = params
    void client.query(academyQuery(academy)).catch(() => undefined)
    void client.query(venuesQuery(academy)).catch(() => undefined)
    void client.query(coachesQuery(academy)).catch(() => undefined)
    if (clinicId) void client.query(clinicQuery(academy, clinicId)).catch(() => undefined)
    return null
  }

/** A new clinic, or one that is changed. */
export default function EditorPage() {
  const { academy: slug = '', clinicId } = useParams()
  const academy = useQuery(academyQuery(slug))
  const venues = useQuery(venuesQuery(slug))
  const coaches = useQuery(coachesQuery(slug))
  const clinic = useQuery({ ...clinicQuery(slug, clinicId ?? ''), enabled: clinicId !== undefined })
  const { error, retry } = together(academy, venues, coaches, clinic)
  if (error) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(error)} onRetry={retry} />
      </main>
    )
  }
  if (!academy.data || !venues.data || !coaches.data || (clinicId && !clinic.data)) {
    return (
      <main id="main" className="wrap py-8">
        <SkeletonRows rows={6} />
      </main>
    )
  }
  const { currency, zone } = academy.data
  const [venue] = venues.data.venues
  const [area] = venue?.areas ?? []
  const [coach] = coaches.data.coaches
  if (!venue || !area || !coach) {
    return (
      <main id="main" className="wrap py-8">
        <EmptyState action={<Link to={paths.setUp(slug)}>Go to set-up</Link>}>
          A clinic needs a venue with an area, and a coach. Add them first.
        </EmptyState>
      </main>
    )
  }
  const first = { venueId: venue.id, areaId: area.id, units: area.units, coachId: coach.id }
  return (
    <Editor
      key={clinicId ?? 'new'}
      academy={academy.data}
      venues={venues.data.venues}
      coaches={coaches.data.coaches}
      clinic={clinic.data ?? null}
      first={
        clinic.data ? draftOf(clinic.data, currency) : newDraft({ ...first, today: todayIn(zone) })
      }
    />
  )
}

function Editor(props: EditorChoices & { academy: Academy; clinic: Clinic | null; first: Draft }) {
  const { academy, venues, coaches, clinic } = props
  const { slug } = academy
  const navigate = useNavigate()
  const [draft, setDraft] = useState(props.first)
  const title = clinic ? `Change ${clinic.title}` : 'New clinic'
  useTitle(title)
  const { save, keptId, errors, notice } = useSaveClinic(academy, clinic?.id)
  const press = ({ isPublished }: { isPublished: boolean }) =>
    save.mutate(
      { draft, isPublished },
      {
        onSuccess: (saved) => {
          toast(isPublished ? 'On the page now.' : 'Kept.')
          void navigate(paths.clinicCard(slug, saved.id))
        },
      },
    )
  const isLive = clinic?.state === 'published'
  return (
    <main id="main" className="wrap">
      <PageHead
        crumb={<Link to={paths.clinics(slug)}>Clinics</Link>}
        title={title}
        sub={
          isLive
            ? 'It is on the page: golfers see a change at once.'
            : 'Kept as a draft. Nobody sees it until you put it on the page.'
        }
        actions={
          <>
            {clinic?.state === 'draft' && (
              <ThrowAway
                academy={slug}
                clinic={clinic}
                onGone={() => void navigate(paths.clinics(slug))}
              />
            )}
            <Button
              waiting={save.isPending && 'Keeping…'}
              onClick={() => press({ isPublished: false })}
            >
              {isLive ? 'Keep the change' : 'Keep as draft'}
            </Button>
            {!isLive && (
              <Button
                kind="go"
                waiting={save.isPending && 'Keeping…'}
                onClick={() => press({ isPublished: true })}
              >
                Put on the page
              </Button>
            )}
          </>
        }
      />
      {notice && (
        <div className="mb-4">
          <Notice kind="flag">{notice}</Notice>
        </div>
      )}
      <ClinicEditor
        academy={academy}
        venues={venues}
        coaches={coaches}
        draft={draft}
        onChange={(change) => setDraft((had) => ({ ...had, ...change }))}
        errors={errors}
        clinicId={keptId}
      />
    </main>
  )
}
