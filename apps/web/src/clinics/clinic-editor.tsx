import { useQuery } from '@tanstack/react-query'
import { useDeferredValue, useEffect, useRef } from 'react'
import { makeFormat } from '../academies/format'
import type { Academy } from '../academies/queries'
import { sentenceOf } from '../api/problem'
import { Field, TextArea, focusFirstWrong } from '../ui/field'
import { Notice } from '../ui/notice'
import { SkeletonRows } from '../ui/states'
import { ClinicPreview } from './clinic-preview'
import { ClinicSentence } from './clinic-sentence'
import type { Draft } from './draft'
import { previewQuery } from './queries'
import type { EditorChoices } from './sentence-part'
import { patternOf } from './write-clinic'

/** Writing a clinic: the sentence, what it is called, and every date as it is being written. */
export function ClinicEditor(
  props: EditorChoices & {
    academy: Academy
    draft: Draft
    onChange: (change: Partial<Draft>) => void
    /** What the fields were refused for; the focus goes to the first of them. */
    errors: Readonly<Record<string, string>>
    clinicId?: string | undefined
  },
) {
  const { academy, venues, coaches, draft, onChange, errors, clinicId } = props
  const whole = useRef<HTMLDivElement>(null)
  useEffect(() => {
    if (Object.keys(errors).length > 0) focusFirstWrong(whole.current)
  }, [errors])
  const pattern = patternOf(useDeferredValue(draft))
  const zone = venues.find(({ id }) => id === draft.venueId)?.zone ?? academy.zone
  const preview = useQuery(
    previewQuery(academy.slug, pattern && { ...pattern, ...(clinicId ? { clinicId } : {}) }),
  )
  const isWrong = (field: string) =>
    Object.keys(errors).some((path) => path === field || path.startsWith(`${field}.`))
  return (
    <div ref={whole}>
      <ClinicSentence
        draft={draft}
        onChange={onChange}
        venues={venues}
        coaches={coaches}
        isWrong={isWrong}
      />
      <ProseFields draft={draft} onChange={onChange} errors={errors} />
      {preview.isError && <Notice kind="flag">{sentenceOf(preview.error)}</Notice>}
      {preview.isPending && pattern && <SkeletonRows rows={4} />}
      {preview.data && (
        <ClinicPreview
          preview={preview.data}
          format={makeFormat({ ...academy, zone })}
          skipDates={draft.skipDates}
          onSkip={(day) => onChange({ skipDates: [...draft.skipDates, day].sort() })}
          onKeep={(day) => onChange({ skipDates: draft.skipDates.filter((had) => had !== day) })}
        />
      )}
    </div>
  )
}

function ProseFields(props: {
  draft: Draft
  onChange: (change: Partial<Draft>) => void
  errors: Readonly<Record<string, string>>
}) {
  const { draft, onChange, errors } = props
  return (
    <div className="kcols">
      <div>
        <Field
          label="What it is called"
          value={draft.title}
          onChange={(event) => onChange({ title: event.target.value })}
          error={errors['title']}
        />
        <Field
          label="In one line"
          hint="Who it is for and what they will do."
          value={draft.summary}
          onChange={(event) => onChange({ summary: event.target.value })}
          error={errors['summary']}
        />
      </div>
      <div>
        <TextArea
          label="More about it"
          rows={3}
          value={draft.about}
          onChange={(event) => onChange({ about: event.target.value })}
          error={errors['about']}
        />
        <Field
          label="What to bring"
          value={draft.bring}
          onChange={(event) => onChange({ bring: event.target.value })}
          error={errors['bring']}
        />
      </div>
    </div>
  )
}
