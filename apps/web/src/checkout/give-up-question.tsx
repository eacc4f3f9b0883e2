import { useQuery } from '@tanstack/react-query'
import type { Format } from '../academies/format'
import { sentenceOf } from '../api/problem'
import type { Enrolment } from '../enrolments/queries'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { ErrorState, SkeletonRows } from '../ui/states'
import { toast } from '../ui/toast'
import { giveUpQuoteQuery, useGiveUp, type GiverUp } from './queries'

/** What giving a place up costs, read before it is pressed; the golfer asks, or the desk for them. */
export function GiveUpQuestion(props: {
  academy: string
  enrolment: Enrolment
  format: Format
  by: GiverUp
  onDone: () => void
}) {
  const { academy, enrolment, format, by, onDone } = props
  const giveUp = useGiveUp(academy, enrolment.id, by)
  const quote = useQuery({
    ...giveUpQuoteQuery(academy, enrolment.id, by),
    staleTime: 0,
    // What is being given up has no price any more.
    enabled: giveUp.isIdle || giveUp.isError,
  })
  if (quote.isPending) return <SkeletonRows rows={2} />
  if (quote.isError) {
    return <ErrorState sentence={sentenceOf(quote.error)} onRetry={() => void quote.refetch()} />
  }
  const { refundMinor, sentence, places, comesBackAs } = quote.data
  const amount = format.money(refundMinor)
  const press = () =>
    giveUp.mutate(
      { refundMinor },
      {
        onSuccess: () => {
          toast(refundMinor === 0 ? 'Given up.' : `Given up. ${amount} ${ON_ITS_WAY[comesBackAs]}.`)
          onDone()
        },
        // The sentence is shown above the buttons; the amount is asked for anew.
        onError: () => void quote.refetch(),
      },
    )
  return (
    <>
      <p className="lead mb-3">
        {enrolment.golfer.name} gives up {places === 1 ? '1 session' : `${places} sessions`} of{' '}
        {enrolment.clinic.title}.
      </p>
      <p className="mb-4">
        {sentence}{' '}
        <b>
          {refundMinor === 0
            ? 'Nothing comes back.'
            : `${amount} comes back ${comesBackAs === 'cash' ? 'in cash at the desk' : 'to the card'}.`}
        </b>
      </p>
      {giveUp.error && <Notice kind="flag">{sentenceOf(giveUp.error)}</Notice>}
      <div className="actions mt-4">
        <Button kind="danger" waiting={giveUp.isPending && 'Giving up…'} onClick={press}>
          Give it up
        </Button>
        <Button onClick={onDone}>Keep the place</Button>
      </div>
    </>
  )
}

const ON_ITS_WAY = {
  card: 'is on its way back to the card',
  cash: 'comes back in cash at the desk',
  nothing: '',
} as const
