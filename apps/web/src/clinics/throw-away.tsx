import { useState } from 'react'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { sentenceOf } from '../api/problem'
import { Button } from '../ui/button'
import { Dialog } from '../ui/dialog'
import { Notice } from '../ui/notice'
import type { Clinic } from './queries'

/** Throws a draft away, after asking: nothing brings it back. */
export function ThrowAway(props: { academy: string; clinic: Clinic; onGone: () => void }) {
  const { academy, clinic, onGone } = props
  const [isAsking, setIsAsking] = useState(false)
  const throwAway = useAcademyMutation(academy, (clinicId: string) =>
    call('clinics.throw-away', { academy, params: { clinicId } }),
  )
  return (
    <>
      <Button kind="quiet" onClick={() => setIsAsking(true)}>
        Throw draft away
      </Button>
      <Dialog
        title={`Throw ${clinic.title} away?`}
        isOpen={isAsking}
        onClose={() => setIsAsking(false)}
      >
        <p className="lead mb-3">
          It goes with all its dates, and cannot be brought back. Nobody has seen it yet.
        </p>
        {throwAway.error && <Notice kind="flag">{sentenceOf(throwAway.error)}</Notice>}
        <div className="actions">
          <Button
            kind="danger"
            waiting={throwAway.isPending && 'One moment…'}
            onClick={() => throwAway.mutate(clinic.id, { onSuccess: onGone })}
          >
            Throw it away
          </Button>
          <Button onClick={() => setIsAsking(false)}>Keep it</Button>
        </div>
      </Dialog>
    </>
  )
}
