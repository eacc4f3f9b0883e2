import { useQuery, type QueryClient } from '@tanstack/react-query'
import { NavLink, Outlet, redirect, useParams, type LoaderFunctionArgs } from 'react-router'
import { sessionQuery } from '../accounts/queries'
import { academyPageQuery } from '../clinics/queries'
import { paths } from '../paths'
import { useAccent } from './accent'
import { PublicBar } from './public-bar'
import { PublicFoot } from './public-foot'

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
      <PublicBar academy={{ slug, name: data?.academy.name ?? '' }} />
      <Outlet />
      <nav className="tabs" aria-label="Your golf">
        <NavLink to={paths.my(slug)} end>
          Today
        </NavLink>
        <NavLink to={paths.academy(slug)} end>
          Clinics
        </NavLink>
        <NavLink to={paths.myPlaces(slug)}>Places</NavLink>
        <NavLink to={paths.family(slug)}>Family</NavLink>
      </nav>
      <PublicFoot>{data?.academy.name}</PublicFoot>
    </div>
  )
}
