import type { ReactNode } from 'react'
import { Link } from 'react-router'
import { useSession } from '../accounts/queries'
import { paths } from '../paths'
import { Pennon } from '../ui/initials'

interface PublicNavProps {
  academy: { slug: string; name: string }
  current?: 'clinics'
  /** Words of its own instead of the academy's; without them, those of a visitor. */
  children?: ReactNode
}

/** The words at the top of an academy's public pages. */
export function PublicNav({ academy, current, children }: PublicNavProps) {
  return (
    <nav className="pubnav" aria-label="Academy">
      <Link to={paths.academy(academy.slug)} className="mark">
        <Pennon />
        {academy.name}
      </Link>
      {children ?? <VisitorWords slug={academy.slug} current={current} />}
    </nav>
  )
}

function VisitorWords({ slug, current }: { slug: string; current: 'clinics' | undefined }) {
  const { data: session } = useSession()
  return (
    <>
      <span className="sp" />
      <Link
        to={paths.academy(slug)}
        aria-current={current === 'clinics' ? 'page' : undefined}
        className="hide"
      >
        Clinics
      </Link>
      {session?.account ? (
        <Link to={paths.my(slug)}>{session.account.name.split(' ')[0]}</Link>
      ) : (
        <Link to={paths.signIn(location.pathname)}>Sign in</Link>
      )}
    </>
  )
}

export function PublicBar(props: PublicNavProps) {
  return (
    <header className="pubbar">
      <div className="wrap public">
        <PublicNav {...props} />
      </div>
    </header>
  )
}
