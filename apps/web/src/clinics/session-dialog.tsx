import { useState } from 'react'
import type { Format } from '../academies/format'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { sentenceOf } from '../api/problem'
import { Button } from '../ui/button'
import { Dialog } from '../ui/dialog'
import { Field } from '../ui/field'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'
import { ChangeSession } from './change-session'
import type { Session } from './queries'

/** One session: change it, or call it off. */
export function SessionDialog(props: {
  academy: string
  session: Session
  format: Format
  onClose: () => void
}) {
  const { academy, session, format, onClose } = props
  const [isCallingOff, setIsCallingOff] = useState(false)
  const title = `Session ${session.number}, ${format.session(session)}`
  const isOver = session.state === 'called-off' || session.registerState === 'closed'
  return (
    <Dialog title={title} isOpen isWrittenOn onClose={onClose}>
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
          <ChangeSession academy={academy} session={session} format={format} onDone={onClose} />
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
