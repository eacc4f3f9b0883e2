import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useNavigate } from 'react-router'
import { useSession } from '../accounts/queries'
import { useSignInFields } from '../accounts/sign-in-fields'
import { useForm } from '../api/form'
import type { ClinicPage } from '../clinics/queries'
import { EMPTY_DEPENDANT, type DependantDraft } from '../golfers/dependant-fields'
import { myGolfersQuery } from '../golfers/queries'
import { paths } from '../paths'
import { useHold } from './queries'
import { amountOf, whoFits, whoIsFor } from './what-and-who'

const SHOWN = ['account', 'for.dependant', 'for.handicap', 'handicap', 'hasAcceptedWaiver']

interface Choice {
  what: string
  sessionId: string
  /** Null while nobody was picked: whoever fits. */
  picked: string | null
  handicap: string
  dependant: DependantDraft
  hasAccepted: boolean
}

/** What somebody chooses in the panel beside a clinic, and the press that takes the place. */
export function useTaking({ academy, clinic }: ClinicPage) {
  const navigate = useNavigate()
  const { data: session } = useSession()
  const account = session?.account ?? null
  const mine = useQuery({ ...myGolfersQuery(academy.slug), enabled: account !== null })
  const golfers = mine.data?.golfers ?? []
  const signIn = useSignInFields()
  const hold = useHold(academy.slug)

  const ahead = clinic.sessions.filter(({ isPast, state }) => !isPast && state === 'planned')
  const [choice, setChoice] = useState<Choice>({
    what: clinic.saleMode === 'drop-in' ? 'session' : 'run',
    sessionId: ahead[0]?.id ?? '',
    picked: null,
    handicap: '',
    dependant: EMPTY_DEPENDANT,
    hasAccepted: false,
  })
  const { what, sessionId, picked, handicap, dependant, hasAccepted } = choice
  const chosen = what === 'session' ? ahead.filter(({ id }) => id === sessionId) : ahead
  const firstStartsAt = chosen[0]?.startsAt ?? ahead[0]?.startsAt ?? clinic.startsAt
  const who = picked ?? whoFits(golfers, clinic, firstStartsAt)

  const { form, ...refusal } = useForm(
    async () => {
      if (!account) await signIn.submit()
      const enrolment = await hold.mutateAsync({
        clinicId: clinic.id,
        ...(what === 'session' ? { sessionId } : {}),
        for: whoIsFor({ who, handicap, dependant }),
        // The API says the sentence when this is not so.
        hasAcceptedWaiver: hasAccepted as true,
      })
      await navigate(paths.myPlace(academy.slug, enrolment.id))
    },
    {
      beside: SHOWN.filter((field) => isShown(field, { who, asksHandicap: asksHandicap(clinic) })),
    },
  )
  return {
    form,
    ...refusal,
    account,
    golfers,
    signIn,
    ahead,
    choice: { ...choice, who },
    change: (part: Partial<Choice>) => setChoice((had) => ({ ...had, ...part })),
    /** Takes another date: what was refused for the one before says nothing of it. */
    chooseDate: (part: { what: string } | { sessionId: string }) => {
      refusal.refuse(null)
      setChoice((had) => ({ ...had, ...part }))
    },
    firstStartsAt,
    amountMinor: amountOf(clinic, what),
    isFull:
      refusal.problem?.code === 'session-full' ||
      chosen.some(({ taken, capacity }) => taken >= capacity),
  }
}

export type Taking = ReturnType<typeof useTaking>

export const asksHandicap = ({ handicapMin, handicapMax }: ClinicPage['clinic']): boolean =>
  handicapMin !== null || handicapMax !== null

/** A refusal of a field that is not on the panel has to be said above the button. */
function isShown(field: string, given: { who: string; asksHandicap: boolean }): boolean {
  if (field === 'for.dependant') return given.who === 'new'
  if (field.endsWith('handicap')) return given.who === 'me' && given.asksHandicap
  return true
}
