import { useState } from 'react'
import { todayIn } from '../academies/local-day'
import type { Academy } from '../academies/queries'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { ClinicEditor } from './clinic-editor'
import { newDraft } from './draft'
import { useSaveClinic } from './save-clinic'
import type { EditorChoices } from './sentence-part'

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
      today: todayIn(academy.zone),
    })
  })
  const { save, keptId, errors, notice } = useSaveClinic(academy)
  return (
    <>
      <ClinicEditor
        academy={academy}
        venues={venues}
        coaches={coaches}
        draft={draft}
        onChange={(change) => setDraft((had) => ({ ...had, ...change }))}
        errors={errors}
        clinicId={keptId}
      />
      {notice && <Notice kind="flag">{notice}</Notice>}
      <p className="rowb2 mt-4">
        <Button
          kind="go"
          isBig
          waiting={save.isPending && 'Keeping…'}
          onClick={() => save.mutate({ draft, isPublished: true })}
        >
          Keep these dates
        </Button>
        <Button kind="quiet" onClick={props.onLater}>
          Do this later
        </Button>
      </p>
    </>
  )
}
