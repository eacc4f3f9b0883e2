import { scopeOf, type Permission } from '@marram/contract/routes'
import { useQuery, type QueryClient } from '@tanstack/react-query'
import { Link, NavLink, Outlet, redirect, useParams, type LoaderFunctionArgs } from 'react-router'
import { homeIn } from '../accounts/home'
import { rolesIn, sessionQuery, useSession } from '../accounts/queries'
import { ApiProblem } from '../api/problem'
import { paths } from '../paths'
import { Drawing } from '../ui/drawing'
import { Initials, Pennon, initialsOf } from '../ui/initials'
import { ThemeSwitch } from '../ui/theme-switch'
import { useAccent } from './accent'
import { SignedOut } from './signed-out'

/** Staff pages need sign-in and a role here. Somebody without one sees nothing of the academy. */
export const loader =
  (client: QueryClient) =>
  async ({ request, params }: LoaderFunctionArgs) => {
    const session = await client.query({ ...sessionQuery, staleTime: 'static' })
    const url = new URL(request.url)
    if (!session.account) return redirect(paths.signIn(url.pathname + url.search))
    const roles = rolesIn(session, params['academy'] ?? '')
    if (roles.some((role) => role !== 'golfer')) return null
    throw new ApiProblem({ code: 'not-found', status: 404, detail: 'There is no such academy.' })
  }

const NAV: { label: string; to: (academy: string) => string; needs: Permission }[] = [
  { label: 'Week', to: (academy) => paths.week(academy), needs: 'clinics:read' },
  { label: 'Clinics', to: paths.clinics, needs: 'clinics:titles' },
  { label: 'Golfers', to: paths.golfers, needs: 'golfers:read' },
  { label: 'Money', to: (academy) => paths.money(academy), needs: 'ledger:read' },
  { label: 'Set-up', to: paths.setUp, needs: 'venues:change' },
]

export default function StaffLayout() {
  const { academy: slug = '' } = useParams()
  const { data: session } = useSession()
  const roles = rolesIn(session, slug)
  const academy = session?.memberships.find((entry) => entry.academy.slug === slug)?.academy
  useAccent(academy)
  const may = (permission: Permission) => scopeOf(roles, permission) !== null
  const shown = NAV.filter(({ needs }) => may(needs))
  const name = session?.account?.name ?? ''
  return (
    <div className="staff">
      <header className="mast">
        <div>
          <Link to={homeIn(slug, roles)} className="mark">
            <Drawing of="logo" />
            Marram
          </Link>
          <nav aria-label="Desk">
            {shown.map(({ label, to }) => (
              <NavLink key={label} to={to(slug)}>
                {label}
              </NavLink>
            ))}
          </nav>
          <Link className="acad" to={paths.academy(slug)}>
            <Pennon />
            {academy?.name}
          </Link>
          <Link className="who" to={paths.family(slug)} aria-label={name}>
            <Initials of={initialsOf(name)} />
            <span>{name}</span>
          </Link>
        </div>
      </header>
      <SignedOut />
      <Outlet />
      <footer className="foot">
        <div className="wrap">
          <Link to={paths.my(slug)}>Your own golf</Link>
          {may('venues:change') && (
            <Link className="onhand" to={paths.setUp(slug)}>
              Set-up
            </Link>
          )}
          <ThemeSwitch />
        </div>
      </footer>
      <nav className="tabs onhand" aria-label="Desk">
        {may('register:take') && <NavLink to={paths.today(slug)}>Today</NavLink>}
        {shown
          .filter(({ label }) => label !== 'Set-up')
          .map(({ label, to }) => (
            <NavLink key={label} to={to(slug)}>
              {label}
            </NavLink>
          ))}
      </nav>
    </div>
  )
}

/** Whether the person may do something in this academy; what they may not is not shown. */
export function useMay(): (permission: Permission) => boolean {
  const { academy: slug = '' } = useParams()
  const { data: session } = useQuery(sessionQuery)
  const roles = rolesIn(session, slug)
  return (permission) => scopeOf(roles, permission) !== null
}
