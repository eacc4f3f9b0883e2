import { Link, useLocation } from 'react-router'
import { useSession } from '../accounts/queries'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { Notice } from '../ui/notice'

/** Over a page that needs sign-in, when it has ended meanwhile. What is typed below stays. */
export function SignedOut() {
  const { data: session } = useSession()
  if (!session || session.account) return null
  return (
    <div className="wrap py-4">
      <Notice kind="flag" action={<SignInHere />}>
        Your sign-in has ended. Sign in again, and you come back to this page.
      </Notice>
    </div>
  )
}

/** Leads to signing in, and back to where it was pressed. */
export function SignInHere() {
  const { pathname, search } = useLocation()
  return (
    <Link className={buttonClass()} to={paths.signIn(pathname + search)}>
      Sign in
    </Link>
  )
}
