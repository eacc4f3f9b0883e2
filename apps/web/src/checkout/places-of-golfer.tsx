import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { makeFormat, type Format } from '../academies/format'
import { sentenceOf } from '../api/problem'
import { placesOfGolferQuery, type Enrolment } from '../enrolments/queries'
import { standingAtDesk } from '../enrolments/standing'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { ErrorState, SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'
import { GiveUpQuestion } from './give-up-question'
import { useTakeCash } from './queries'

/** A golfer's places for the desk: take cash, give a place up for them. */
export function PlacesOfGolfer(props: { academy: string; golferId: string; format: Format }) {
  const { academy, golferId, format } = props
  const places = useQuery(placesOfGolferQuery(academy, golferId))
  return (
    <section>
      <div className="sh">
        <h2>Places</h2>
      </div>
      {places.isPending && <SkeletonRows rows={3} />}
      {places.isError && (
        <ErrorState sentence={sentenceOf(places.error)} onRetry={() => void places.refetch()} />
      )}
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
  const { academy, enrolment } = props
  const format = makeFormat({ ...props.format, zone: enrolment.clinic.zone })
  const [isAsking, setIsAsking] = useState(false)
  const cash = useTakeCash(academy, enrolment.id)
  const takeCash = () =>
    cash.mutate({ amountMinor: enrolment.owedMinor }, { onSuccess: () => toast('Taken in cash.') })
  const [first] = enrolment.places
  return (
    <li className="placeline">
      <div>
        <b>{enrolment.clinic.title}</b>
        <br />
        <span className="soft note">
          {first && format.session(first)}. {standingAtDesk(enrolment)},{' '}
          {enrolment.totalMinor === 0 ? 'free' : format.money(enrolment.totalMinor)}
        </span>
        {cash.error && <Notice kind="flag">{sentenceOf(cash.error)}</Notice>}
      </div>
      {enrolment.state === 'confirmed' && (
        <div className="actions">
          {enrolment.owedMinor > 0 && (
            <Button waiting={cash.isPending && 'Taking…'} onClick={takeCash}>
              Take {format.money(enrolment.owedMinor)} in cash
            </Button>
          )}
          <Button kind="quiet" onClick={() => setIsAsking(!isAsking)}>
            Give up
          </Button>
        </div>
      )}
      {isAsking && (
        <div className="w-full">
          <GiveUpQuestion
            academy={academy}
            enrolment={enrolment}
            format={format}
            by="desk"
            onDone={() => setIsAsking(false)}
          />
        </div>
      )}
    </li>
  )
}
