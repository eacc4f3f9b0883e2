import { taxInWords, type Format } from '../academies/format'
import { sentenceOf } from '../api/problem'
import { refundInWords } from '../clinics/refund-words'
import type { AcademyFace } from '../clinics/queries'
import type { Enrolment } from '../enrolments/queries'
import { Button } from '../ui/button'
import { Bill, Facts } from '../ui/facts'
import { Notice } from '../ui/notice'
import { Steps } from '../ui/steps'
import { useGoToPayment, useLetGo, usePayAtDesk } from './queries'

/** Who, what, cost with tax, what happens if it is called off or given up, and until when it is held. */
export function BeforeYouPay(props: {
  enrolment: Enrolment
  academy: AcademyFace
  format: Format
  isBack: boolean
}) {
  const { enrolment, academy, format } = props
  return (
    <>
      <h1>{enrolment.isOffer ? 'A place is free for you' : 'Before you pay'}</h1>
      <div className="my-5 grid gap-3">
        <HeldNotice {...props} />
      </div>
      <div className="cols">
        <Facts
          facts={[
            ['Who', enrolment.golfer.name],
            ['What', enrolment.clinic.title],
            ['When', whenInWords(enrolment, format)],
            ['Where', enrolment.clinic.venueName],
            [
              'If we call off',
              'The session is owed to you: credit or your money back. You choose.',
            ],
            ['If you give up', refundInWords(academy)],
          ]}
        />
        <div className="panel">
          <Steps steps={['What', 'Who', 'Pay']} current={2} />
          <div className="pad">
            <Bill
              lines={[
                [`${enrolment.clinic.title}, net`, format.money(enrolment.netMinor)],
                ...(enrolment.taxMinor > 0
                  ? ([[academy.taxName, format.money(enrolment.taxMinor)]] as const)
                  : []),
                ['To pay', format.money(enrolment.totalMinor)],
              ]}
            />
            <WaysToPay enrolment={enrolment} academy={academy} />
            <p className="hint mt-3">
              {enrolment.payMode === 'card' &&
                'Card numbers are typed on the payment provider’s page only. '}
              {taxInWords(academy)}
            </p>
          </div>
        </div>
      </div>
    </>
  )
}

/** Until when the place is held, and how its payment stands. */
function HeldNotice(props: { enrolment: Enrolment; format: Format; isBack: boolean }) {
  const { enrolment, format, isBack } = props
  const until = enrolment.heldUntil ? format.time(enrolment.heldUntil) : ''
  if (enrolment.payment === 'declined') {
    return (
      <Notice kind="flag">
        <b>The payment did not go through.</b> Your bank said no. Nothing was taken, and the place
        is held until {until}.
      </Notice>
    )
  }
  if (isBack) {
    return (
      <Notice>
        <b>Waiting for word of your payment.</b> This takes a few seconds; the place is held
        meanwhile.
      </Notice>
    )
  }
  return (
    <Notice>
      The place is held until <b>{until}</b>.
    </Notice>
  )
}

/** By card, at the desk, or not at all; why a press was refused stands above them. */
function WaysToPay({ enrolment, academy }: { enrolment: Enrolment; academy: AcademyFace }) {
  const pay = useGoToPayment(academy.slug, enrolment.id)
  const atDesk = usePayAtDesk(academy.slug, enrolment.id)
  const letGo = useLetGo(academy.slug, enrolment.id)
  const error = pay.error ?? atDesk.error ?? letGo.error
  const isCard = enrolment.payMode === 'card'
  return (
    <>
      {error && <Notice kind="flag">{sentenceOf(error)}</Notice>}
      {isCard && (
        <Button
          kind="go"
          isWide
          isBig
          waiting={(pay.isPending || pay.isSuccess) && 'Going to payment…'}
          onClick={() => pay.mutate()}
        >
          {enrolment.payment === 'declined' ? 'Try again' : 'Go to payment'}
        </Button>
      )}
      {(academy.canPayAtDesk || !isCard) && (
        <div className="mt-3">
          <Button
            kind={isCard ? 'plain' : 'go'}
            isWide
            waiting={atDesk.isPending && 'Taking the place…'}
            onClick={() => atDesk.mutate()}
          >
            {isCard ? 'Pay at the desk instead' : 'Pay at the desk'}
          </Button>
        </div>
      )}
      <div className="mt-3">
        <Button
          kind="quiet"
          waiting={letGo.isPending && 'Letting go…'}
          onClick={() => letGo.mutate()}
        >
          Let the place go
        </Button>
      </div>
    </>
  )
}

export function whenInWords({ places }: Enrolment, format: Format): string {
  const [first] = places
  const last = places.at(-1)
  if (!first || !last) return ''
  if (places.length === 1) return format.session(first)
  return `${places.length} sessions from ${format.session(first)} to ${format.day(last.startsAt)}`
}
