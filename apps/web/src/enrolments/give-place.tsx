import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { makeFormat, type Format } from '../academies/format'
import { ApiProblem, sentenceOf } from '../api/problem'
import { clinicQuery, clinicsQuery, type Clinic, type ClinicInList } from '../clinics/queries'
import { Button } from '../ui/button'
import { CheckField, SelectField } from '../ui/field'
import { Notice } from '../ui/notice'
import { ErrorState, SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'
import { useNow } from '../ui/use-now'
import { useGivePlace } from './queries'

interface Golfer {
  academy: string
  golferId: string
  format: Format
}

/** Staff take a place for a golfer; it is paid at the desk. */
export function GivePlace(props: Golfer) {
  const clinics = useQuery(clinicsQuery(props.academy))
  const ahead = clinics.data?.clinics.filter(
    ({ state, nextStartsAt }) => state === 'published' && nextStartsAt !== null,
  )
  return (
    <section className="mt-7">
      <div className="sh">
        <h2>Give a place</h2>
      </div>
      {clinics.isPending && <SkeletonRows rows={2} />}
      {clinics.isError && (
        <ErrorState sentence={sentenceOf(clinics.error)} onRetry={() => void clinics.refetch()} />
      )}
      {ahead?.length === 0 && <p>No clinic on the page has a session ahead.</p>}
      {ahead && ahead.length > 0 && <Choice {...props} clinics={ahead} />}
    </section>
  )
}

function Choice(props: Golfer & { clinics: readonly ClinicInList[] }) {
  const { academy, golferId, format, clinics } = props
  const [picked, setPicked] = useState({ clinicId: '', sessionId: '' })
  const [isException, setIsException] = useState(false)
  const give = useGivePlace(academy)
  const clinicId = picked.clinicId || (clinics[0]?.id ?? '')
  const clinic = useQuery(clinicQuery(academy, clinicId))
  const sessions = useSessionsAhead(clinic.data)
  const isDropIn = clinic.data?.saleMode === 'drop-in'
  const sessionId = picked.sessionId || (isDropIn ? (sessions[0]?.id ?? '') : '')
  const misfits = give.error instanceof ApiProblem && give.error.code === 'golfer-does-not-fit'
  const startAnew = () => {
    give.reset()
    setIsException(false)
  }
  const pick = (other: typeof picked) => {
    // An exception was made for what was chosen then, and for nothing else.
    startAnew()
    setPicked(other)
  }
  const press = () =>
    give.mutate(
      {
        clinicId,
        golferId,
        isException: misfits && isException,
        ...(sessionId ? { sessionId } : {}),
      },
      {
        onSuccess: () => {
          toast('The place is theirs.')
          startAnew()
        },
      },
    )
  return (
    <>
      {give.error && <Notice kind="flag">{sentenceOf(give.error)}</Notice>}
      <SelectField
        label="Clinic"
        value={clinicId}
        onChange={(other) => pick({ clinicId: other, sessionId: '' })}
        options={clinics.map(({ id, title, taken, capacity }) => ({
          value: id,
          label: `${title} (${taken} of ${capacity})`,
        }))}
      />
      {clinic.isError && (
        <ErrorState sentence={sentenceOf(clinic.error)} onRetry={() => void clinic.refetch()} />
      )}
      {clinic.data && clinic.data.saleMode !== 'run' && (
        <SelectField
          label="Which"
          value={sessionId}
          onChange={(other) => pick({ clinicId, sessionId: other })}
          options={whichOptions(clinic.data, sessions, format)}
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
        {clinic.data?.payMode === 'free'
          ? 'Give the place'
          : 'Give the place, to be paid at the desk'}
      </Button>
    </>
  )
}

function useSessionsAhead(clinic: Clinic | undefined) {
  const now = useNow()
  return (clinic?.sessions ?? []).filter(
    ({ startsAt, state }) => Date.parse(startsAt) > now && state === 'planned',
  )
}

function whichOptions(clinic: Clinic, sessions: Clinic['sessions'], academyFormat: Format) {
  const format = makeFormat({ ...academyFormat, zone: clinic.zone })
  const run = clinic.saleMode === 'drop-in' ? [] : [{ value: '', label: 'The whole run' }]
  const single = sessions.map((session) => ({
    value: session.id,
    label: `${format.session(session)} (${session.taken} of ${session.capacity})`,
  }))
  return [...run, ...single]
}
