import {
  Link,
  Outlet,
  ScrollRestoration,
  isRouteErrorResponse,
  useNavigation,
  useRouteError,
} from 'react-router'
import { ApiProblem, sentenceOf } from '../api/problem'
import { paths } from '../paths'
import { buttonClass } from '../ui/button'
import { SignInHere } from './signed-out'

export function RootLayout() {
  return (
    <>
      <a className="skip" href="#main">
        Skip to the page
      </a>
      <UnderWay />
      <Outlet />
      <ScrollRestoration />
    </>
  )
}

/** A line along the top edge while the next page is on its way; a quick one comes without it. */
function UnderWay() {
  const isUnderWay = useNavigation().state !== 'idle'
  return (
    <div role="status" className={isUnderWay ? 'underway on' : 'underway'}>
      {isUnderWay && <span className="vh">The page is on its way.</span>}
    </div>
  )
}

/** What is shown when a page cannot be. */
export function PageError() {
  const error = useRouteError()
  const isMissing =
    error instanceof ApiProblem
      ? error.status === 404
      : isRouteErrorResponse(error) && error.status === 404
  const isSignedOut = error instanceof ApiProblem && error.code === 'not-signed-in'
  return (
    <main id="main" className="wrap narrow py-16">
      <h1>{isMissing ? 'There is nothing here' : 'This page did not come up'}</h1>
      <p className="lead my-4">
        {isMissing
          ? 'The address may be old, or the clinic may be off the page.'
          : sentenceOf(error)}
      </p>
      <p className="actions">
        {isSignedOut && <SignInHere />}
        <Link className={buttonClass()} to={paths.home()}>
          Go to the front page
        </Link>
      </p>
    </main>
  )
}
