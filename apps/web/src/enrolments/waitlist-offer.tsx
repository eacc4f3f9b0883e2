import { useState } from 'react'
import { useNavigate } from 'react-router'
import { problemOf, type ApiProblem } from '../api/problem'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { toast } from '../ui/toast'
import { useJoinWaitlist } from './queries'

/** Full: what the waitlist is, and the one press that joins it. */
export function WaitlistOffer(props: {
  academy: string
  clinicId: string
  sessionId?: string
  who: string
  /** As it was typed, for somebody who waits themselves. */
  handicap: string
  /** Signs somebody in first who is not; null for somebody who is. */
  signIn: (() => Promise<unknown>) | null
  waiting: number
  onRefused: (problem: ApiProblem | null) => void
}) {
  const { academy, clinicId, sessionId, who, waiting } = props
  const navigate = useNavigate()
  const join = useJoinWaitlist(academy)
  const [isBusy, setIsBusy] = useState(false)

  const press = async () => {
    props.onRefused(null)
    setIsBusy(true)
    try {
      await props.signIn?.()
      const entry = await join.mutateAsync({
        clinicId,
        ...(sessionId ? { sessionId } : {}),
        ...(who === 'me' ? handicapOf(props.handicap) : { golferId: who }),
      })
      toast(`On the waitlist, number ${entry.position}.`)
      await navigate(paths.my(academy))
    } catch (caught) {
      props.onRefused(problemOf(caught))
    } finally {
      setIsBusy(false)
    }
  }

  return (
    <>
      <p className="mb-3">
        <b>Every place is taken.</b>{' '}
        {waiting > 0 ? `${waiting} ${waiting === 1 ? 'golfer waits' : 'golfers wait'}. ` : ''}
        Who waits is offered a freed place by mail, first come, first offered.
      </p>
      <Button
        kind="go"
        isWide
        isBig
        waiting={isBusy && 'Joining…'}
        onClick={() => void press()}
        reason={who === 'new' ? 'Add them under Family first, then they can wait too.' : undefined}
      >
        Join the waitlist
      </Button>
    </>
  )
}

function handicapOf(typed: string): { handicap?: number } {
  return typed.trim() === '' ? {} : { handicap: Number(typed.replace(',', '.')) }
}
