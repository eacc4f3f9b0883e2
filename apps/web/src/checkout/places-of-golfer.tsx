import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import type { Format } from '../academies/format'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { routeQuery } from '../api/query'
import { sentenceOf } from '../api/problem'
import type { Enrolment } from '../enrolments/queries'
import { standingOf } from '../enrolments/standing'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { ErrorState, SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'

/** A golfer's places for the desk: take cash, give a place up for them. */
export function PlacesOfGolfer(props: { academy: string; golferId: string; format: Format }) {
  const { academy, golferId, format } = props
  const places = useQuery(routeQuery('enrolments.of-golfer', { academy, params: { golferId } }))
  return (
    <section>
      <div className="sh">
        <h2>Places</h2>
      </div>
      {places.isPending && <SkeletonRows rows={3} />}
      {places.isError && <ErrorState sentence={sentenceOf(places.error)} />}
      {places.data?.enrolments.length === 0 && <p>No places yet.</p>}
      <ul>
        {places.data?.enrolments.map((enrolment) => (
          <PlaceLine key={enrolment.id} academy={academy} enrolment={enrolment} format={format} />
        ))}
      </ul>
    </section>
  )
}

function PlaceLine(props: { academy: string; enrolment: Enrolment; format: Format }) {
  const { academy, enrolment, format } = props
  const [isAsking, setIsAsking] = useState(false)
  const params = { enrolmentId: enrolment.id }
  const cash = useAcademyMutation(academy, (_: void) =>
    call('checkout.take-cash', { academy, params, body: { amountMinor: enrolment.owedMinor } }),
  )
  const [first] = enrolment.places
  return (
    <li className="placeline">
      <div>
        <b>{enrolment.clinic.title}</b>
        <br />
        <span className="soft note">
          {first && format.session(first)}. {standingOf(enrolment)},{' '}
          {enrolment.totalMinor === 0 ? 'free' : format.money(enrolment.totalMinor)}
        </span>
        {cash.error && <Notice kind="flag">{sentenceOf(cash.error)}</Notice>}
      </div>
      {enrolment.state === 'confirmed' && (
        <div className="actions">
          {enrolment.payment === 'at-desk' && enrolment.owedMinor > 0 && (
            <Button
              kind="go"
              waiting={cash.isPending && 'Taking…'}
              onClick={() => cash.mutate(undefined, { onSuccess: () => toast('Taken in cash.') })}
            >
              Take {format.money(enrolment.owedMinor)} in cash
            </Button>
          )}
          <Button kind="quiet" onClick={() => setIsAsking(!isAsking)}>
            Give up
          </Button>
        </div>
      )}
      {isAsking && (
        <GiveUpFor
          academy={academy}
          enrolment={enrolment}
          format={format}
          onDone={() => setIsAsking(false)}
        />
      )}
    </li>
  )
}

function GiveUpFor(props: {
  academy: string
  enrolment: Enrolment
  format: Format
  onDone: () => void
}) {
  const { academy, enrolment, format, onDone } = props
  const params = { enrolmentId: enrolment.id }
  const quote = useQuery(routeQuery('checkout.quote-giving-up-for', { academy, params }))
  const giveUp = useAcademyMutation(academy, (refundMinor: number) =>
    call('checkout.give-up-for', { academy, params, body: { refundMinor } }),
  )
  if (quote.isError) return <Notice kind="flag">{sentenceOf(quote.error)}</Notice>
  if (!quote.data) return <SkeletonRows rows={1} />
  const { refundMinor, sentence, comesBackAs } = quote.data
  return (
    <div className="w-full">
      <Notice
        action={
          <Button
            kind="danger"
            waiting={giveUp.isPending && 'Giving up…'}
            onClick={() => giveUp.mutate(refundMinor, { onSuccess: onDone })}
          >
            Give it up
          </Button>
        }
      >
        {sentence}{' '}
        <b>
          {refundMinor === 0
            ? 'Nothing goes back.'
            : `${format.money(refundMinor)} goes back ${comesBackAs === 'cash' ? 'in cash' : 'to the card'}.`}
        </b>
        {giveUp.error && <p className="flagtext">{sentenceOf(giveUp.error)}</p>}
      </Notice>
    </div>
  )
}
