import type { Format } from '../academies/format'
import { SignInFields } from '../accounts/sign-in-fields'
import type { ClinicPage } from '../clinics/queries'
import { DependantFields } from '../golfers/dependant-fields'
import { paths } from '../paths'
import { CheckField, Field } from '../ui/field'
import { Picks } from '../ui/picks'
import { asksHandicap, type Taking } from './use-taking'
import { datePicks, whatPicks, whoPicks } from './what-and-who'

interface PartProps {
  taking: Omit<Taking, 'form'>
  page: ClinicPage
}

/** The whole run or one session, and which. */
export function WhatPart({ taking, page, format }: PartProps & { format: Format }) {
  const { choice, chooseDate, ahead } = taking
  return (
    <>
      <Picks
        legend="What"
        value={choice.what}
        onChange={(what) => chooseDate({ what })}
        picks={whatPicks(page.clinic, ahead, format)}
      />
      {choice.what === 'session' && (
        <Picks
          legend="Which date?"
          value={choice.sessionId}
          onChange={(sessionId) => chooseDate({ sessionId })}
          picks={datePicks(ahead, format)}
        />
      )}
    </>
  )
}

/** Who it is for, and what has to be known of them. */
export function WhoPart({ taking, page: { academy, clinic } }: PartProps) {
  const { choice, change, errors, golfers, account, firstStartsAt } = taking
  return (
    <>
      <Picks
        legend="Who is it for?"
        value={choice.who}
        onChange={(picked) => change({ picked })}
        picks={whoPicks({ golfers, clinic, firstStartsAt, myName: account?.name })}
      />
      {choice.who === 'new' && (
        <DependantFields
          draft={choice.dependant}
          onChange={(dependant) => change({ dependant })}
          errors={errors}
          prefix="for.dependant."
          safeguarding={academy.safeguarding}
        />
      )}
      {choice.who === 'me' && asksHandicap(clinic) && (
        <Field
          label="Your handicap"
          inputMode="decimal"
          value={choice.handicap}
          onChange={(event) => change({ handicap: event.target.value })}
          // The hold and the waitlist name it differently.
          error={errors['for.handicap'] ?? errors['handicap']}
        />
      )}
      {!account && (
        <SignInFields
          fields={taking.signIn}
          errors={errors}
          returnTo={paths.clinic(academy.slug, clinic.slug)}
        />
      )}
    </>
  )
}

/** What is agreed to, read where it is agreed to. */
export function AgreementPart({ taking, page }: PartProps) {
  const { choice, change, errors } = taking
  return (
    <>
      <details className="mb-4">
        <summary>What you agree to</summary>
        <p className="note mt-2">{page.academy.waiver}</p>
      </details>
      <CheckField
        label="I have read this and agree."
        isChecked={choice.hasAccepted}
        onChange={(hasAccepted) => change({ hasAccepted })}
        error={errors['hasAcceptedWaiver']}
      />
    </>
  )
}
