import { lazy, Suspense, useState } from 'react'
import type { Format } from '../academies/format'
import type { Enrolment } from '../enrolments/queries'
import { Button } from '../ui/button'
import { GiveUpQuestion } from './give-up-question'

const Dialog = lazy(() => import('../ui/dialog').then(({ Dialog: Sheet }) => ({ default: Sheet })))

/** Giving a place up: the policy and the amount are read before anything is pressed. */
export function GiveUp(props: { academy: string; enrolment: Enrolment; format: Format }) {
  const [isOpen, setIsOpen] = useState(false)
  const hasAhead = props.enrolment.places.some(
    ({ state, mark }) => state === 'confirmed' && mark === null,
  )
  if (!hasAhead) return null
  const close = () => setIsOpen(false)
  return (
    <div className="mt-4">
      <Button kind="quiet" onClick={() => setIsOpen(true)}>
        Give the place up
      </Button>
      {isOpen && (
        <Suspense>
          <Dialog title="Give the place up?" isOpen onClose={close}>
            <GiveUpQuestion {...props} by="golfer" onDone={close} />
          </Dialog>
        </Suspense>
      )}
    </div>
  )
}
