import { useState } from 'react'
import type { Academy } from '../academies/queries'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { ApiProblem } from '../api/problem'
import { bodyOf, type Draft } from './draft'

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
      throw new ApiProblem({ code: 'invalid-fields', status: 422, detail: written.sentence })
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
  return { save, keptId }
}
