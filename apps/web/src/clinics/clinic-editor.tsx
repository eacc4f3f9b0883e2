import { keepPreviousData, useQuery } from '@tanstack/react-query'
import { useDeferredValue } from 'react'
import type { Answer } from '@marram/contract'
import { makeFormat } from '../academies/format'
import type { Academy } from '../academies/queries'
import { call } from '../api/client'
import { sentenceOf } from '../api/problem'
import { Field, TextArea } from '../ui/field'
import { Notice } from '../ui/notice'
import { SkeletonRows } from '../ui/states'
import { ClinicPreview } from './clinic-preview'
import { ClinicSentence } from './clinic-sentence'
import { patternOf, type Draft } from './draft'

/** What the sentence's words choose from. */
export interface EditorChoices {
  venues: Answer<'venues.list'>['venues']
  coaches: Answer<'coaches.list'>['coaches']
}

/** Writing a clinic: the sentence, what it is called, and every date as it is being written. */
export function ClinicEditor(
  props: EditorChoices & {
    academy: Academy
    draft: Draft
    onChange: (change: Partial<Draft>) => void
    errors: Readonly<Record<string, string>>
    clinicId?: string
  },
) {
  const { academy, venues, coaches, draft, onChange, errors, clinicId } = props
  const pattern = useDeferredValue(patternOf(draft))
  const zone = venues.find(({ id }) => id === draft.venueId)?.zone ?? academy.zone
  const preview = useQuery({
    queryKey: [academy.slug, 'clinics.preview', JSON.stringify(pattern), clinicId ?? ''],
    queryFn: ({ signal }) => {
      if (!pattern) throw new Error('asked for only when the sentence is whole')
      const body = { ...pattern, ...(clinicId ? { clinicId } : {}) }
      return call('clinics.preview', { academy: academy.slug, body, signal })
    },
    enabled: pattern !== null,
    placeholderData: keepPreviousData,
    retry: false,
  })
  return (
    <>
      <ClinicSentence draft={draft} onChange={onChange} venues={venues} coaches={coaches} />
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
    </>
  )
}
