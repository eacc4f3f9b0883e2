import { Link } from 'react-router'
import { useSession } from '../accounts/queries'
import { paths } from '../paths'
import { Pennon } from '../ui/initials'

/** The words at the top of an academy's public pages. */
export function PublicNav({
  academy,
  current,
}: {
  academy: { slug: string; name: string }
  current?: 'clinics'
}) {
  const { data: session } = useSession()
  const here = paths.academy(academy.slug)
  return (
    <nav className="pubnav" aria-label="Academy">
      <Link to={here} className="mark">
        <Pennon />
        {academy.name}
      </Link>
      <span className="sp" />
      <Link to={here} aria-current={current === 'clinics' ? 'page' : undefined} className="hide">
        Clinics
      </Link>
      {session?.account ? (
        <Link to={paths.my(academy.slug)}>{session.account.name.split(' ')[0]}</Link>
      ) : (
        <Link to={paths.signIn(location.pathname)}>Sign in</Link>
      )}
    </nav>
  )
}

export function PublicBar({ academy }: { academy: { slug: string; name: string } }) {
  return (
    <header className="pubbar">
      <div className="wrap public">
        <PublicNav academy={academy} />
      </div>
    </header>
  )
}
