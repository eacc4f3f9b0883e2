import { useNavigate } from 'react-router'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { useSession, useSignOut } from './queries'

/** Signs out here, or on every device at once. */
export function SignOut() {
  const navigate = useNavigate()
  const { data: session } = useSession()
  const signOut = useSignOut()
  const go = async (isEverywhere: boolean) => {
    await signOut.mutateAsync({ isEverywhere })
    await navigate(paths.home())
  }
  if (!session?.account) return null
  return (
    <section className="my-8">
      <p className="soft mb-2">
        Signed in as {session.account.name}, {session.account.email}.
      </p>
      <p className="actions">
        <Button waiting={signOut.isPending && 'Signing out…'} onClick={() => void go(false)}>
          Sign out
        </Button>
        <Button kind="quiet" onClick={() => void go(true)}>
          Sign out everywhere
        </Button>
      </p>
    </section>
  )
}
