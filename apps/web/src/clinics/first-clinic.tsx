import { useState } from 'react'
import type { Academy } from '../academies/queries'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { ApiProblem } from '../api/problem'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { ClinicEditor, type EditorChoices } from './clinic-editor'
import { bodyOf, newDraft } from './draft'

/** The third sentence: the first clinic, with every date of it. */
export function FirstClinic(props: EditorChoices & { academy: Academy; onLater: () => void }) {
  const { academy, venues, coaches } = props
  const [draft, setDraft] = useState(() => {
    const [venue] = venues
    const [area] = venue?.areas ?? []
    return newDraft({
      venueId: venue?.id ?? '',
      areaId: area?.id ?? '',
      units: area?.units ?? 1,
      coachId: coaches[0]?.id ?? '',
    })
  })
  const [problem, setProblem] = useState<ApiProblem | null>(null)
  const keep = useAcademyMutation(academy.slug, async () => {
    const written = bodyOf(draft, academy.currency)
    if (!written.ok) {
      throw new ApiProblem({ code: 'invalid-fields', status: 422, detail: written.sentence })
    }
    const clinic = await call('clinics.draft', { academy: academy.slug, body: written.body })
    return call('clinics.publish', {
      academy: academy.slug,
      params: { clinicId: clinic.id },
      body: { isPublished: true },
    })
  })
  const press = async () => {
    setProblem(null)
    try {
      await keep.mutateAsync(undefined)
    } catch (caught) {
      if (caught instanceof ApiProblem) setProblem(caught)
    }
  }
  return (
    <>
      <ClinicEditor
        academy={academy}
        venues={venues}
        coaches={coaches}
        draft={draft}
        onChange={(change) => setDraft((had) => ({ ...had, ...change }))}
        errors={problem?.fields ?? {}}
      />
      {problem && <Notice kind="flag">{problem.message}</Notice>}
      <p className="rowb2 mt-4">
        <Button kind="go" isBig waiting={keep.isPending && 'Keeping…'} onClick={() => void press()}>
          Keep these dates
        </Button>
        <Button kind="quiet" onClick={props.onLater}>
          Do this later
        </Button>
      </p>
    </>
  )
}
