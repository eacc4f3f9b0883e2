import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import type { Sent } from '@marram/contract'
import type { Format } from '../academies/format'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { ApiProblem, sentenceOf } from '../api/problem'
import { clinicQuery, clinicsQuery } from '../clinics/queries'
import { Button } from '../ui/button'
import { CheckField, SelectField } from '../ui/field'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'
import { useNow } from '../ui/use-now'

/** Staff take a place for a golfer; it is paid at the desk. */
export function GivePlace(props: { academy: string; golferId: string; format: Format }) {
  const { academy, golferId, format } = props
  const clinics = useQuery(clinicsQuery(academy))
  const ahead = (clinics.data?.clinics ?? []).filter(
    ({ state, nextStartsAt }) => state === 'published' && nextStartsAt !== null,
  )
  const [clinicId, setClinicId] = useState('')
  const [sessionId, setSessionId] = useState('')
  const [isException, setIsException] = useState(false)
  const chosen = clinicId || ahead[0]?.id || ''
  const clinic = useQuery({ ...clinicQuery(academy, chosen), enabled: chosen !== '' })
  const give = useAcademyMutation(academy, (body: Sent<'enrolments.give', 'body'>) =>
    call('enrolments.give', { academy, body }),
  )
  const now = useNow()
  const sessions = (clinic.data?.sessions ?? []).filter(
    ({ startsAt, state }) => Date.parse(startsAt) > now && state === 'planned',
  )
  const isDropIn = clinic.data?.saleMode === 'drop-in'
  const session = sessionId || (isDropIn ? (sessions[0]?.id ?? '') : '')
  const press = () =>
    give.mutate(
      { clinicId: chosen, golferId, isException, ...(session ? { sessionId: session } : {}) },
      { onSuccess: () => toast('The place is theirs.') },
    )
  const misfits = give.error instanceof ApiProblem && give.error.code === 'golfer-does-not-fit'
  if (ahead.length === 0) return null
  return (
    <section className="mt-7">
      <div className="sh">
        <h2>Give a place</h2>
      </div>
      {give.error && <Notice kind="flag">{sentenceOf(give.error)}</Notice>}
      <SelectField
        label="Clinic"
        value={chosen}
        onChange={(value) => {
          setClinicId(value)
          setSessionId('')
        }}
        options={ahead.map(({ id, title, taken, capacity }) => ({
          value: id,
          label: `${title} (${taken} of ${capacity})`,
        }))}
      />
      {clinic.data && clinic.data.saleMode !== 'run' && (
        <SelectField
          label="Which"
          value={session}
          onChange={setSessionId}
          options={[
            ...(isDropIn ? [] : [{ value: '', label: 'The whole run' }]),
            ...sessions.map((entry) => ({
              value: entry.id,
              label: `${format.session(entry)} (${entry.taken} of ${entry.capacity})`,
            })),
          ]}
        />
      )}
      {misfits && (
        <CheckField
          label="Give the place all the same."
          isChecked={isException}
          onChange={setIsException}
        />
      )}
      <Button waiting={give.isPending && 'Giving…'} onClick={press}>
        Give the place, to be paid at the desk
      </Button>
    </section>
  )
}
