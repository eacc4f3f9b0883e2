import { useState } from 'react'
import type { Academy } from '../academies/queries'
import { ApiProblem } from '../api/problem'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { ClinicEditor, type EditorChoices } from './clinic-editor'
import { newDraft } from './draft'
import { useSaveClinic } from './save-clinic'

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
  const { save, keptId } = useSaveClinic(academy)
  const press = async () => {
    setProblem(null)
    try {
      await save.mutateAsync({ draft, isPublished: true })
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
        {...(keptId ? { clinicId: keptId } : {})}
      />
      {problem && <Notice kind="flag">{problem.message}</Notice>}
      <p className="rowb2 mt-4">
        <Button kind="go" isBig waiting={save.isPending && 'Keeping…'} onClick={() => void press()}>
          Keep these dates
        </Button>
        <Button kind="quiet" onClick={props.onLater}>
          Do this later
        </Button>
      </p>
    </>
  )
}
