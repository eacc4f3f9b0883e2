import { roleWord, type StaffRole } from '../accounts/role-words'
import { sentenceOf } from '../api/problem'
import { Button } from '../ui/button'
import { Dialog } from '../ui/dialog'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'
import { useRemoveStaff, useWithdrawInvitation } from './queries'

/** What is about to be taken from somebody. */
export type Taken =
  | { kind: 'role'; accountId: string; name: string; role: StaffRole }
  | { kind: 'invitation'; invitationId: string; email: string }

/** Asks before a role or an invitation is gone: there is no way back but inviting anew. */
export function TakeAway(props: { slug: string; taken: Taken; onClose: () => void }) {
  const { slug, taken, onClose } = props
  const remove = useRemoveStaff(slug)
  const withdraw = useWithdrawInvitation(slug)
  const words = wordsOf(taken)
  const onSuccess = () => {
    toast(words.done)
    onClose()
  }
  const press = () =>
    taken.kind === 'role'
      ? remove.mutate({ accountId: taken.accountId, role: taken.role }, { onSuccess })
      : withdraw.mutate({ invitationId: taken.invitationId }, { onSuccess })
  const error = remove.error ?? withdraw.error
  return (
    <Dialog title={words.title} isOpen onClose={onClose}>
      <p className="mb-4">{words.means}</p>
      {error && <Notice kind="flag">{sentenceOf(error)}</Notice>}
      <div className="actions mt-4">
        <Button
          kind="danger"
          waiting={(remove.isPending || withdraw.isPending) && words.waiting}
          onClick={press}
        >
          {words.action}
        </Button>
        <Button onClick={onClose}>Leave it</Button>
      </div>
    </Dialog>
  )
}

function wordsOf(taken: Taken) {
  if (taken.kind === 'invitation') {
    return {
      title: 'Withdraw the invitation?',
      means: `The link in the mail to ${taken.email} opens nothing any more.`,
      action: 'Withdraw it',
      waiting: 'Withdrawing…',
      done: 'The invitation is withdrawn.',
    }
  }
  const { name, role } = taken
  const word = roleWord(role).toLowerCase()
  return {
    title: 'Take the role away?',
    means: `${name} is no longer here as ${word}, from this moment. To give it back, invite them anew.`,
    action: 'Take it away',
    waiting: 'Taking away…',
    done: `${name} is no longer here as ${word}.`,
  }
}
