import { useState } from 'react'
import type { Sent } from '@marram/contract'
import { useQuery } from '@tanstack/react-query'
import type { Format } from '../academies/format'
import { coachesQuery } from '../academies/queries'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { sentenceOf } from '../api/problem'
import { Button } from '../ui/button'
import { Dialog } from '../ui/dialog'
import { Field, SelectField } from '../ui/field'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'
import type { Session } from './queries'

/** One session: change its time, coach or capacity, or call it off. */
export function SessionDialog(props: {
  academy: string
  clinicId: string
  session: Session
  format: Format
  onClose: () => void
}) {
  const { academy, session, format, onClose } = props
  const [isCallingOff, setIsCallingOff] = useState(false)
  const title = `Session ${session.number}, ${format.session(session)}`
  const isOver = session.state === 'called-off' || session.registerState === 'closed'
  return (
    <Dialog title={title} isOpen onClose={onClose}>
      {isOver ? (
        <p>
          {session.state === 'called-off'
            ? `Called off: ${session.calledOffReason ?? ''}.`
            : 'The register is closed. Open it again to change anything.'}
        </p>
      ) : isCallingOff ? (
        <CallOff academy={academy} session={session} onDone={onClose} />
      ) : (
        <>
          <Change academy={academy} session={session} format={format} onDone={onClose} />
          <div className="mt-5">
            <Button kind="danger" onClick={() => setIsCallingOff(true)}>
              Call this session off
            </Button>
          </div>
        </>
      )}
    </Dialog>
  )
}

function Change(props: { academy: string; session: Session; format: Format; onDone: () => void }) {
  const { academy, session, format, onDone } = props
  const coaches = useQuery(coachesQuery(academy))
  const had = localOf(session.startsAt, format.zone)
  const minutes = (Date.parse(session.endsAt) - Date.parse(session.startsAt)) / 60_000
  const [day, setDay] = useState(had.day)
  const [time, setTime] = useState(had.time)
  const [duration, setDuration] = useState(String(minutes))
  const [coachId, setCoachId] = useState(session.coaches[0]?.id ?? '')
  const [capacity, setCapacity] = useState(String(session.capacity))
  const change = useAcademyMutation(academy, (body: Sent<'sessions.change', 'body'>) =>
    call('sessions.change', { academy, params: { sessionId: session.id }, body }),
  )
  const press = () =>
    change.mutate(
      {
        startsOnLocal: day,
        startsAtLocal: time,
        durationMinutes: Number(duration),
        capacity: Number(capacity),
        ...(coachId === session.coaches[0]?.id ? {} : { coachIds: [coachId] }),
      },
      {
        onSuccess: () => {
          toast('Changed. Golfers get a mail with the new time.')
          onDone()
        },
      },
    )
  return (
    <>
      {change.error && <Notice kind="flag">{sentenceOf(change.error)}</Notice>}
      <div className="f two">
        <Field
          label="Day"
          type="date"
          value={day}
          onChange={(event) => setDay(event.target.value)}
        />
        <Field
          label="Starts at"
          type="time"
          value={time}
          onChange={(event) => setTime(event.target.value)}
        />
      </div>
      <div className="f two">
        <Field
          label="Minutes"
          type="number"
          value={duration}
          onChange={(event) => setDuration(event.target.value)}
        />
        <Field
          label="Places"
          type="number"
          value={capacity}
          onChange={(event) => setCapacity(event.target.value)}
        />
      </div>
      <SelectField
        label="Coach"
        value={coachId}
        onChange={setCoachId}
        options={(coaches.data?.coaches ?? []).map(({ id, name }) => ({ value: id, label: name }))}
      />
      <Button kind="go" waiting={change.isPending && 'Changing…'} onClick={press}>
        Change this session
      </Button>
    </>
  )
}

function CallOff({
  academy,
  session,
  onDone,
}: {
  academy: string
  session: Session
  onDone: () => void
}) {
  const [reason, setReason] = useState('')
  const callOff = useAcademyMutation(academy, (_: void) =>
    call('sessions.call-off', { academy, params: { sessionId: session.id }, body: { reason } }),
  )
  const golfers = `${session.taken} ${session.taken === 1 ? 'golfer gets' : 'golfers get'}`
  const press = () =>
    callOff.mutate(undefined, {
      onSuccess: () => {
        toast('Called off. The mails are on their way.')
        onDone()
      },
    })
  return (
    <>
      <p className="lead mb-3">
        {golfers} a mail now. Each can take credit or what they paid for this session back.
      </p>
      {callOff.error && <Notice kind="flag">{sentenceOf(callOff.error)}</Notice>}
      <Field
        label="Why?"
        hint="The golfers read this: lightning, gale warning, the coach is ill."
        value={reason}
        onChange={(event) => setReason(event.target.value)}
      />
      <Button
        kind="danger"
        waiting={callOff.isPending && 'Calling off…'}
        onClick={press}
        reason={reason.trim() === '' ? 'Say why first.' : undefined}
      >
        Call it off
      </Button>
    </>
  )
}

function localOf(at: string, zone: string): { day: string; time: string } {
  const day = new Intl.DateTimeFormat('en-CA', { timeZone: zone }).format(new Date(at))
  const time = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    hour: '2-digit',
    minute: '2-digit',
  }).format(new Date(at))
  return { day, time }
}
