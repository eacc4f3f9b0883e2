import { useMutation } from '@tanstack/react-query'
import { call } from '../api/client'
import { sentenceOf } from '../api/problem'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { useSession } from './queries'

/** Until an address is confirmed, a word about it and the mail once more. */
export function VerifyReminder() {
  const { data: session } = useSession()
  const send = useMutation({ mutationFn: () => call('accounts.send-verification', {}) })
  const account = session?.account
  if (!account || account.isVerified) return null
  return (
    <div className="mb-4">
      <Notice
        action={
          send.isSuccess ? null : (
            <Button waiting={send.isPending && 'Sending…'} onClick={() => send.mutate()}>
              Send it again
            </Button>
          )
        }
      >
        {send.isSuccess
          ? `A mail is on its way to ${account.email}.`
          : `Please confirm ${account.email}: the link is in your mail.`}
        {send.error && <p className="flagtext">{sentenceOf(send.error)}</p>}
      </Notice>
    </div>
  )
}
