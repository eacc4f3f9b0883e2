import { useQuery, type QueryClient } from '@tanstack/react-query'
import { NavLink, Outlet, redirect, useParams, type LoaderFunctionArgs } from 'react-router'
import { sessionQuery } from '../accounts/queries'
import { SignOutWord } from '../accounts/sign-out'
import { academyPageQuery } from '../clinics/queries'
import { paths } from '../paths'
import { useAccent } from './accent'
import { PublicBar } from './public-bar'
import { PublicFoot } from './public-foot'
import { SignedOut } from './signed-out'

/** A golfer's own pages need sign-in; coming back afterwards is seen to. */
export const loader =
  (client: QueryClient) =>
  async ({ request }: LoaderFunctionArgs) => {
    const { account } = await client.query({ ...sessionQuery, staleTime: 'static' })
    const url = new URL(request.url)
    return account ? null : redirect(paths.signIn(url.pathname + url.search))
  }

export default function GolferLayout() {
  const { academy: slug = '' } = useParams()
  const { data } = useQuery(academyPageQuery(slug))
  useAccent(data?.academy)
  return (
    <div className="golfer">
      <PublicBar academy={{ slug, name: data?.academy.name ?? '' }}>
        <span className="sp" />
        <OwnWords slug={slug} className="hide" />
        <SignOutWord className="hide" />
      </PublicBar>
      <SignedOut />
      <Outlet />
      <nav className="tabs" aria-label="Your golf">
        <OwnWords slug={slug} />
      </nav>
      <PublicFoot>{data?.academy.name}</PublicFoot>
    </div>
  )
}

const OWN_PAGES = [
  { label: 'Today', to: paths.my, isWhole: true },
  { label: 'Clinics', to: paths.academy, isWhole: true },
  { label: 'Places', to: paths.myPlaces, isWhole: false },
  { label: 'Family', to: paths.family, isWhole: false },
] as const

/** The four words of somebody's own golf: at the bottom on a phone, in the bar at a desk. */
function OwnWords({ slug, className }: { slug: string; className?: string }) {
  return OWN_PAGES.map(({ label, to, isWhole }) => (
    <NavLink key={label} to={to(slug)} end={isWhole} {...(className ? { className } : {})}>
      {label}
    </NavLink>
  ))
}
