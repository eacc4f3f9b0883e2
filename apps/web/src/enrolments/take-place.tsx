import { useQuery } from '@tanstack/react-query'
import { useRef, useState, type SubmitEvent } from 'react'
import { useNavigate } from 'react-router'
import { taxInWords, type Format } from '../academies/format'
import { useSession } from '../accounts/queries'
import { SignInFields, useSignInFields } from '../accounts/sign-in-fields'
import { ApiProblem, sentenceOf } from '../api/problem'
import type { ClinicPage } from '../clinics/queries'
import { DependantFields, EMPTY_DEPENDANT, type DependantDraft } from '../golfers/dependant-fields'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { CheckField, Field, focusFirstWrong } from '../ui/field'
import { Notice } from '../ui/notice'
import { Picks } from '../ui/picks'
import { Steps } from '../ui/steps'
import { WaitlistOffer } from './waitlist-offer'
import { myGolfersQuery, useHold } from './queries'
import { amountOf, refusalFor, whatPicks, whoFits, whoIsFor } from './what-and-who'

/** What, Who, Pay: the panel beside a clinic. Signing in happens on the way. */
export function TakePlace({ page, format }: { page: ClinicPage; format: Format }) {
  const { academy, clinic } = page
  const navigate = useNavigate()
  const form = useRef<HTMLFormElement>(null)
  const { data: session } = useSession()
  const account = session?.account ?? null
  const golfers = useQuery({ ...myGolfersQuery(academy.slug), enabled: account !== null })
  const signIn = useSignInFields()
  const hold = useHold(academy.slug)

  const [what, setWhat] = useState(() => (clinic.saleMode === 'drop-in' ? 'session' : 'run'))
  const ahead = clinic.sessions.filter(({ isPast, state }) => !isPast && state === 'planned')
  const [sessionId, setSessionId] = useState(ahead[0]?.id ?? '')
  const [picked, setWho] = useState<string | null>(null)
  const [handicap, setHandicap] = useState('')
  const [dependant, setDependant] = useState<DependantDraft>(EMPTY_DEPENDANT)
  const [hasAccepted, setHasAccepted] = useState(false)
  const [problem, setProblem] = useState<ApiProblem | null>(null)
  const [isBusy, setIsBusy] = useState(false)

  const who = picked ?? whoFits(golfers.data?.golfers ?? [], clinic)
  const chosen = what === 'session' ? ahead.find(({ id }) => id === sessionId) : undefined
  const amount = amountOf(clinic, what)
  const isFull =
    what === 'session'
      ? (chosen?.taken ?? 0) >= (chosen?.capacity ?? 1)
      : ahead.some(({ taken, capacity }) => taken >= capacity)

  const submit = async (event: SubmitEvent) => {
    event.preventDefault()
    setProblem(null)
    setIsBusy(true)
    try {
      if (!account) await signIn.submit()
      const enrolment = await hold.mutateAsync({
        clinicId: clinic.id,
        ...(what === 'session' ? { sessionId } : {}),
        for: whoIsFor({ who, handicap, dependant }),
        // The API says the sentence when this is not so.
        hasAcceptedWaiver: hasAccepted as true,
      })
      await navigate(paths.myPlace(academy.slug, enrolment.id))
    } catch (error) {
      setProblem(
        error instanceof ApiProblem
          ? error
          : new ApiProblem({ code: 'unexpected', status: 0, detail: sentenceOf(error) }),
      )
      focusFirstWrong(form.current)
    } finally {
      setIsBusy(false)
    }
  }

  if (ahead.length === 0) {
    return (
      <aside className="panel mt-9" id="take-a-place">
        <div className="pad">Every session of this clinic has been held.</div>
      </aside>
    )
  }
  return (
    <form
      ref={form}
      className="panel mt-9"
      id="take-a-place"
      aria-label="Take a place"
      onSubmit={(event) => void submit(event)}
      noValidate
    >
      <div className="top">
        <span className="disp text-title">{amount === 0 ? 'Free' : format.money(amount)}</span>
        <span className="soft">
          {what === 'session' ? '1 session' : `${ahead.length} sessions`}
          {amount > 0 && taxInWords(academy) ? `, ${taxInWords(academy)}` : ''}
        </span>
      </div>
      <Steps steps={['What', 'Who', 'Pay']} current={account ? 1 : 0} />
      <div className="pad">
        <Picks
          legend="What"
          value={what}
          onChange={setWhat}
          picks={whatPicks(clinic, ahead, format)}
        />
        {what === 'session' && (
          <Picks
            legend="Which date?"
            value={sessionId}
            onChange={setSessionId}
            picks={ahead.map((entry) => ({
              value: entry.id,
              title: format.session(entry),
              detail:
                entry.taken >= entry.capacity
                  ? 'Full: you can join the waitlist'
                  : `${entry.capacity - entry.taken} of ${entry.capacity} places left`,
            }))}
          />
        )}
        <Picks
          legend="Who is it for?"
          value={who}
          onChange={setWho}
          picks={[
            {
              value: 'me',
              title: 'Me',
              detail: account ? account.name : undefined,
              ...refusalFor(golfers.data?.golfers.find(({ isMe }) => isMe) ?? null, clinic),
            },
            ...(golfers.data?.golfers ?? [])
              .filter(({ isMe }) => !isMe)
              .map((golfer) => ({
                value: golfer.id,
                title: `${golfer.name}${golfer.ageYears === null ? '' : `, ${golfer.ageYears}`}`,
                ...refusalFor(golfer, clinic),
              })),
            {
              value: 'new',
              title: 'Add someone you look after',
              detail: 'Name, date of birth, who to call',
            },
          ]}
        />
        {who === 'new' && (
          <DependantFields
            draft={dependant}
            onChange={setDependant}
            errors={problem?.fields ?? {}}
            prefix="for.dependant."
            safeguarding={academy.safeguarding}
          />
        )}
        {who === 'me' && (clinic.handicapMin !== null || clinic.handicapMax !== null) && (
          <Field
            label="Your handicap"
            inputMode="decimal"
            value={handicap}
            onChange={(event) => setHandicap(event.target.value)}
            error={problem?.fields['for.handicap']}
          />
        )}
        {!account && (
          <SignInFields
            fields={signIn}
            errors={problem?.fields ?? {}}
            returnTo={paths.clinic(academy.slug, clinic.slug)}
          />
        )}
        <details className="mb-4">
          <summary>What you agree to</summary>
          <p className="note mt-2">{academy.waiver}</p>
        </details>
        <CheckField
          label="I have read this and agree."
          isChecked={hasAccepted}
          onChange={setHasAccepted}
          error={problem?.fields['hasAcceptedWaiver']}
        />
        {problem && Object.keys(problem.fields).length === 0 && (
          <div className="mb-4">
            <Notice kind="flag">{problem.message}</Notice>
          </div>
        )}
        {isFull || problem?.code === 'session-full' ? (
          <WaitlistOffer
            academy={academy.slug}
            clinicId={clinic.id}
            {...(what === 'session' ? { sessionId } : {})}
            who={who}
            handicap={handicap}
            signIn={account ? null : signIn.submit}
            onRefused={setProblem}
            waiting={clinic.waiting}
          />
        ) : (
          <>
            <Button type="submit" kind="go" isWide isBig waiting={isBusy && 'Holding a place…'}>
              {amount === 0 ? 'Take the place' : 'Hold my place'}
            </Button>
            <p className="hint mt-3">
              {amount === 0
                ? 'Nothing to pay. You can give it up at any time.'
                : `Held for ${academy.holdMinutes} minutes while you pay. `}
              {account && `Signed in as ${account.email}.`}
            </p>
          </>
        )}
      </div>
    </form>
  )
}
