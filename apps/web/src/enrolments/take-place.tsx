import { taxInWords, type Format } from '../academies/format'
import type { ClinicPage } from '../clinics/queries'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { Steps } from '../ui/steps'
import { AgreementPart, WhatPart, WhoPart } from './taking-parts'
import { useTaking } from './use-taking'
import { WaitlistOffer } from './waitlist-offer'

/** What, Who, Pay: the panel beside a clinic. Signing in happens on the way. */
export function TakePlace({ page, format }: { page: ClinicPage; format: Format }) {
  const { academy, clinic } = page
  const { form, ...taking } = useTaking(page)
  const { account, ahead, amountMinor, choice, isSending, sentence } = taking
  if (ahead.length === 0) {
    return (
      <aside className="panel mt-9" id="take-a-place">
        <div className="pad">Every session of this clinic has been held.</div>
      </aside>
    )
  }
  const tax = amountMinor > 0 ? taxInWords(academy) : ''
  return (
    <form {...form} className="panel mt-9" id="take-a-place" aria-label="Take a place">
      <div className="top">
        <span className="disp text-title">
          {amountMinor === 0 ? 'Free' : format.money(amountMinor)}
        </span>
        <span className="soft">
          {choice.what === 'session' ? '1 session' : `${ahead.length} sessions`}
          {tax && `, ${tax}`}
        </span>
      </div>
      <Steps steps={['What', 'Who', 'Pay']} current={account ? 1 : 0} />
      <div className="pad">
        <WhatPart taking={taking} page={page} format={format} />
        <WhoPart taking={taking} page={page} />
        <AgreementPart taking={taking} page={page} />
        {sentence && (
          <div className="mb-4">
            <Notice kind="flag">{sentence}</Notice>
          </div>
        )}
        {taking.isFull ? (
          <WaitlistOffer
            academy={academy.slug}
            clinicId={clinic.id}
            {...(choice.what === 'session' ? { sessionId: choice.sessionId } : {})}
            who={choice.who}
            handicap={choice.handicap}
            signIn={account ? null : taking.signIn.submit}
            onRefused={taking.refuse}
            waiting={clinic.waiting}
          />
        ) : (
          <>
            <Button type="submit" kind="go" isWide isBig waiting={isSending && 'Holding a place…'}>
              {amountMinor === 0 ? 'Take the place' : 'Hold my place'}
            </Button>
            <p className="hint mt-3">
              {amountMinor === 0
                ? 'Nothing to pay. You can give it up at any time. '
                : `Held for ${academy.holdMinutes} minutes while you pay. `}
              {account && `Signed in as ${account.email}.`}
            </p>
          </>
        )}
      </div>
    </form>
  )
}
