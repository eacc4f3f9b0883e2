import { useSuspenseQuery, type QueryClient } from '@tanstack/react-query'
import { Link } from 'react-router'
import { homeOf } from '../accounts/home'
import { sessionQuery, useSession } from '../accounts/queries'
import { useTitle } from '../layouts/accent'
import { PublicFoot } from '../layouts/public-foot'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { Drawing } from '../ui/drawing'
import { publishedQuery } from './queries'

export const loader = (client: QueryClient) => () =>
  Promise.all([
    client.query({ ...publishedQuery(), staleTime: 'static' }),
    client.query(sessionQuery).catch(() => undefined),
  ])

export default function FrontPage() {
  useTitle('Marram')
  const { data } = useSuspenseQuery(publishedQuery())
  const { data: session } = useSession()
  return (
    <>
      <main id="main" className="wrap narrow py-12">
        <p className="mark">
          <Drawing of="logo" /> Marram
        </p>
        <h1 className="mt-4">One place for a golf academy’s working day</h1>
        <p className="lead my-5 max-w-[52ch]">
          Clinics and the light they are held in, places and what was paid for them, the register on
          a windy range, and books that agree with the bank.
        </p>
        <p className="actions">
          <Link className={buttonClass({ kind: 'go', isBig: true })} to={paths.open()}>
            Open an academy
          </Link>
          {session?.account ? (
            <Link className={buttonClass({ isBig: true })} to={homeOf(session)}>
              Go on as {session.account.name}
            </Link>
          ) : (
            <Link className={buttonClass({ isBig: true })} to={paths.signIn()}>
              Sign in
            </Link>
          )}
        </p>
        <div className="sect">
          <h2>Academies</h2>
        </div>
        <ul className="fix">
          {data.academies.map((academy) => (
            <li key={academy.slug} className="one">
              <h3>
                <Link to={paths.academy(academy.slug)}>{academy.name}</Link>
              </h3>
              <p>{academy.place}</p>
            </li>
          ))}
        </ul>
        {data.academies.length === 0 && (
          <p className="lead py-4">None yet. Yours can be the first.</p>
        )}
      </main>
      <PublicFoot>Marram</PublicFoot>
    </>
  )
}
