import { useState } from 'react'
import { useNavigate } from 'react-router'
import { sentenceOf } from '../api/problem'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'
import { useJoinWaitlist } from './queries'

/** Full: what the waitlist is, and the one press that joins it. */
export function WaitlistOffer(props: {
  academy: string
  clinicId: string
  sessionId?: string
  golfers: readonly { id: string; isMe: boolean }[]
  who: string
  isSignedIn: boolean
  waiting: number
}) {
  const { academy, clinicId, sessionId, golfers, who, waiting } = props
  const navigate = useNavigate()
  const join = useJoinWaitlist(academy)
  const [error, setError] = useState('')
  const golferId = who === 'me' ? golfers.find(({ isMe }) => isMe)?.id : who
  const ready = props.isSignedIn && golferId !== undefined && who !== 'new'

  const press = async () => {
    if (!golferId) return
    try {
      const entry = await join.mutateAsync({
        clinicId,
        golferId,
        ...(sessionId ? { sessionId } : {}),
      })
      toast(`On the waitlist, number ${entry.position}.`)
      await navigate(paths.my(academy))
    } catch (caught) {
      setError(sentenceOf(caught))
    }
  }

  return (
    <>
      <p className="mb-3">
        <b>Every place is taken.</b>{' '}
        {waiting > 0 ? `${waiting} ${waiting === 1 ? 'golfer waits' : 'golfers wait'}. ` : ''}
        Who waits is offered a freed place by mail, first come, first offered.
      </p>
      {error && <Notice kind="flag">{error}</Notice>}
      <Button
        kind="go"
        isWide
        isBig
        waiting={join.isPending && 'Joining…'}
        onClick={() => void press()}
        reason={ready ? undefined : waitReason(props.isSignedIn, who)}
      >
        Join the waitlist
      </Button>
    </>
  )
}

function waitReason(isSignedIn: boolean, who: string): string {
  if (!isSignedIn) return 'Sign in first, so that we know whom to write to.'
  return who === 'new'
    ? 'Add them under Family first, then they can wait too.'
    : 'Take part in a clinic or add yourself under Family first.'
}
