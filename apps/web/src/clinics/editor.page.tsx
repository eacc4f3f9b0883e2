import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import type { Answer } from '@marram/contract'
import { Link, useNavigate, useParams } from 'react-router'
import { academyQuery, type Academy } from '../academies/queries'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { ApiProblem, sentenceOf } from '../api/problem'
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

/** A new clinic, or one that is changed. */
export default function EditorPage() {
  const { academy: slug = '', clinicId } = useParams()
  const academy = useQuery(academyQuery(slug))
  const venues = useQuery(venuesQuery(slug))
  const coaches = useQuery(coachesQuery(slug))
  const clinic = useQuery({ ...clinicQuery(slug, clinicId ?? ''), enabled: clinicId !== undefined })
  const error = academy.error ?? venues.error ?? coaches.error ?? clinic.error
  if (error) {
    return (
      <main id="main" className="wrap py-8">
        <ErrorState sentence={sentenceOf(error)} />
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
  return (
    <Editor
      academy={academy.data}
      venues={venues.data.venues}
      coaches={coaches.data.coaches}
      clinic={clinic.data ?? null}
      first={
        clinic.data
          ? draftOf(clinic.data, academy.data.currency)
          : newDraft({ venueId: venue.id, areaId: area.id, units: area.units, coachId: coach.id })
      }
    />
  )
}

function Editor(props: {
  academy: Academy
  venues: Answer<'venues.list'>['venues']
  coaches: Answer<'coaches.list'>['coaches']
  clinic: Clinic | null
  first: Draft
}) {
  const { academy, venues, coaches, clinic } = props
  const { slug } = academy
  const navigate = useNavigate()
  const [draft, setDraft] = useState(props.first)
  const [problem, setProblem] = useState<ApiProblem | null>(null)
  const title = clinic ? `Change ${clinic.title}` : 'New clinic'
  useTitle(title)

  const { save, keptId } = useSaveClinic(academy, clinic?.id)
  const throwAway = useAcademyMutation(slug, (clinicId: string) =>
    call('clinics.throw-away', { academy: slug, params: { clinicId } }),
  )
  const press = async ({ isPublished }: { isPublished: boolean }) => {
    setProblem(null)
    try {
      const saved = await save.mutateAsync({ draft, isPublished })
      toast(isPublished ? 'On the page now.' : 'Kept.')
      await navigate(paths.clinicCard(slug, saved.id))
    } catch (error) {
      if (error instanceof ApiProblem) setProblem(error)
    }
  }
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
              <Button
                kind="quiet"
                onClick={() =>
                  throwAway.mutate(clinic.id, {
                    onSuccess: () => void navigate(paths.clinics(slug)),
                  })
                }
              >
                Throw draft away
              </Button>
            )}
            <Button
              waiting={save.isPending && 'Keeping…'}
              onClick={() => void press({ isPublished: false })}
            >
              {isLive ? 'Keep the change' : 'Keep as draft'}
            </Button>
            {!isLive && (
              <Button
                kind="go"
                waiting={save.isPending && 'Keeping…'}
                onClick={() => void press({ isPublished: true })}
              >
                Put on the page
              </Button>
            )}
          </>
        }
      />
      {problem && (
        <div className="mb-4">
          <Notice kind="flag">{problem.message}</Notice>
        </div>
      )}
      <ClinicEditor
        academy={academy}
        venues={venues}
        coaches={coaches}
        draft={draft}
        onChange={(change) => setDraft((had) => ({ ...had, ...change }))}
        errors={problem?.fields ?? {}}
        {...(keptId ? { clinicId: keptId } : {})}
      />
    </main>
  )
}
