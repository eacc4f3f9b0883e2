import type { Format } from '../academies/format'
import { sentenceOf } from '../api/problem'
import type { AcademyFace } from '../clinics/queries'
import type { Enrolment } from '../enrolments/queries'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'
import { useChoose } from './queries'

/** Sessions that were called off: credit or money back, the golfer's choice. */
export function OwedPlaces(props: { enrolment: Enrolment; academy: AcademyFace; format: Format }) {
  const { enrolment, academy, format } = props
  const choose = useChoose(academy.slug)
  const press = (placeId: string, choice: 'credit' | 'money') =>
    choose.mutate(
      { placeId, choice },
      {
        onSuccess: () =>
          toast(choice === 'credit' ? 'Kept as credit.' : 'The money is on its way back.'),
      },
    )
  return (
    <div className="grid gap-3 mb-5">
      {enrolment.places.map(({ id, owed, startsAt }) => {
        if (!owed) return null
        const amount = format.money(owed.amountMinor)
        if (owed.choice) {
          return (
            <Notice key={id} kind="ok">
              {format.day(startsAt)} was called off: {amount}{' '}
              {owed.choice === 'credit' ? 'is kept as your credit' : 'was given back'}.
            </Notice>
          )
        }
        return (
          <Notice
            key={id}
            drawing="wind"
            action={
              <span className="actions">
                <Button
                  waiting={choose.isPending && 'Choosing…'}
                  onClick={() => press(id, 'money')}
                >
                  Money back
                </Button>
                <Button
                  waiting={choose.isPending && 'Choosing…'}
                  onClick={() => press(id, 'credit')}
                >
                  Keep as credit
                </Button>
              </span>
            }
          >
            <b>{format.day(startsAt)} was called off.</b> {amount} is yours. Choose until{' '}
            {format.day(owed.chooseBy)}.
          </Notice>
        )
      })}
      {choose.error && <Notice kind="flag">{sentenceOf(choose.error)}</Notice>}
    </div>
  )
}
