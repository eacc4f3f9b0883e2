import { useQuery } from '@tanstack/react-query'
import { lazy, Suspense, useState } from 'react'
import type { Format } from '../academies/format'
import { sentenceOf } from '../api/problem'
import type { AcademyFace } from '../clinics/queries'
import type { Enrolment } from '../enrolments/queries'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'
import { giveUpQuoteQuery, useGiveUp } from './queries'

const Dialog = lazy(() => import('../ui/dialog').then(({ Dialog: Sheet }) => ({ default: Sheet })))

/** Giving a place up: the policy and the amount are read before anything is pressed. */
export function GiveUp(props: { enrolment: Enrolment; academy: AcademyFace; format: Format }) {
  const { enrolment, academy, format } = props
  const [isOpen, setIsOpen] = useState(false)
  const hasAhead = enrolment.places.some(
    ({ state, mark }) => state === 'confirmed' && mark === null,
  )
  if (!hasAhead) return null
  return (
    <div className="mt-4">
      <Button kind="quiet" onClick={() => setIsOpen(true)}>
        Give the place up
      </Button>
      {isOpen && (
        <Suspense>
          <Dialog title="Give the place up?" isOpen onClose={() => setIsOpen(false)}>
            <Question
              enrolment={enrolment}
              academy={academy}
              format={format}
              onDone={() => setIsOpen(false)}
            />
          </Dialog>
        </Suspense>
      )}
    </div>
  )
}

function Question(props: {
  enrolment: Enrolment
  academy: AcademyFace
  format: Format
  onDone: () => void
}) {
  const { enrolment, academy, format, onDone } = props
  const quote = useQuery({ ...giveUpQuoteQuery(academy.slug, enrolment.id), staleTime: 0 })
  const giveUp = useGiveUp(academy.slug, enrolment.id)
  if (quote.isPending) return <SkeletonRows rows={2} />
  if (quote.isError) return <Notice kind="flag">{sentenceOf(quote.error)}</Notice>
  const { refundMinor, sentence, places, comesBackAs } = quote.data
  const press = async () => {
    try {
      await giveUp.mutateAsync({ refundMinor })
      toast(refundMinor > 0 ? `${format.money(refundMinor)} is on its way back.` : 'Given up.')
      onDone()
    } catch {
      // The sentence is shown above the buttons; the amount is asked for anew.
      void quote.refetch()
    }
  }
  return (
    <>
      <p className="lead mb-3">
        {enrolment.golfer.name} gives up {places === 1 ? '1 session' : `${places} sessions`} of{' '}
        {enrolment.clinic.title}.
      </p>
      <p className="mb-4">
        {sentence}{' '}
        {refundMinor > 0 ? (
          <b>
            {format.money(refundMinor)} comes back
            {comesBackAs === 'cash' ? ' in cash at the desk' : ' to the card'}.
          </b>
        ) : (
          <b>Nothing comes back.</b>
        )}
      </p>
      {giveUp.error && <Notice kind="flag">{sentenceOf(giveUp.error)}</Notice>}
      <div className="actions mt-4">
        <Button
          kind="danger"
          waiting={giveUp.isPending && 'Giving up…'}
          onClick={() => void press()}
        >
          Give it up
        </Button>
        <Button onClick={onDone}>Keep the place</Button>
      </div>
    </>
  )
}
