import { useNavigate } from 'react-router'
import { sentenceOf } from '../api/problem'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'
import { useSession, useSignOut } from './queries'

/** Signs out here, or on every device at once. */
export function SignOut() {
  const { data: session } = useSession()
  const signOut = useLeaving()
  if (!session?.account) return null
  const isEverywhere = signOut.isPending && signOut.variables.isEverywhere
  return (
    <section className="my-8">
      <p className="soft mb-2">
        Signed in as {session.account.name}, {session.account.email}.
      </p>
      {signOut.error && (
        <div className="mb-3">
          <Notice kind="flag">{sentenceOf(signOut.error)}</Notice>
        </div>
      )}
      <p className="actions">
        <Button
          waiting={signOut.isPending && !isEverywhere && 'Signing out…'}
          onClick={() => void signOut.leave({ isEverywhere: false })}
        >
          Sign out
        </Button>
        <Button
          kind="quiet"
          waiting={isEverywhere && 'Signing out…'}
          onClick={() => void signOut.leave({ isEverywhere: true })}
        >
          Sign out everywhere
        </Button>
      </p>
    </section>
  )
}

/** The same as one word in a bar; what goes wrong is said in passing. */
export function SignOutWord({ className }: { className: string }) {
  const signOut = useLeaving()
  const press = () =>
    void signOut.leave({ isEverywhere: false, onError: (error) => toast(sentenceOf(error)) })
  return (
    <button type="button" className={`linkish ${className}`} onClick={press}>
      {signOut.isPending ? 'Signing out…' : 'Sign out'}
    </button>
  )
}

function useLeaving() {
  const navigate = useNavigate()
  const signOut = useSignOut()
  const leave = async (how: { isEverywhere: boolean; onError?: (error: unknown) => void }) => {
    // A second press while the first is under way would sign nobody out.
    if (signOut.isPending) return
    try {
      await signOut.mutateAsync({ isEverywhere: how.isEverywhere })
      await navigate(paths.home())
    } catch (error) {
      how.onError?.(error)
    }
  }
  return { ...signOut, leave }
}
