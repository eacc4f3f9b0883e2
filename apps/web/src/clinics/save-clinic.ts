import { useState } from 'react'
import type { Academy } from '../academies/queries'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { noticeOf, type ShownFields } from '../api/notice-of'
import { ApiProblem, sentenceOf } from '../api/problem'
import type { Draft } from './draft'
import { bodyOf } from './write-clinic'

const NONE: Readonly<Record<string, string>> = {}

/** Of the editor's fields four say beside themselves what is wrong; the sentence's words cannot. */
const SHOWN: ShownFields = {
  beside: ['title', 'summary', 'about', 'bring'],
  named: {
    startsOnLocal: 'First day',
    startsAtLocal: 'Start time',
    durationMinutes: 'Duration',
    capacity: 'Golfers',
    ageMin: 'Age from',
    ageMax: 'Age to',
    handicapMin: 'Handicap from',
    handicapMax: 'Handicap to',
    runPriceMinor: 'Price of the run',
    dropInPriceMinor: 'Price of one session',
  },
}

/**
 * Keeps a clinic as it is written, and puts it on the page where that is asked for. What an earlier
 * press kept before its publishing was refused is changed by the next, not written a second time.
 */
export function useSaveClinic(academy: Academy, clinicId?: string) {
  const { slug, currency } = academy
  const [keptId, setKeptId] = useState(clinicId)
  const save = useAcademyMutation(slug, async (wanted: { draft: Draft; isPublished: boolean }) => {
    const written = bodyOf(wanted.draft, currency)
    if (!written.ok) {
      const { sentences: fields } = written
      const detail = Object.values(fields).join(' ')
      throw new ApiProblem({ code: 'invalid-fields', status: 422, detail, fields })
    }
    const { body } = written
    const saved = keptId
      ? await call('clinics.change', { academy: slug, params: { clinicId: keptId }, body })
      : await call('clinics.draft', { academy: slug, body })
    setKeptId(saved.id)
    if (!wanted.isPublished) return saved
    const params = { clinicId: saved.id }
    return call('clinics.publish', { academy: slug, params, body: { isPublished: true } })
  })
  const { error } = save
  return {
    save,
    keptId,
    /** What is wrong, field by field, for the words and the fields to be marked. */
    errors: error instanceof ApiProblem ? error.fields : NONE,
    /** All of it that no field says beside itself. */
    notice: error && (error instanceof ApiProblem ? noticeOf(error, SHOWN) : sentenceOf(error)),
  }
}
