import { useQuery } from '@tanstack/react-query'
import { useRef, useState, type SubmitEvent } from 'react'
import { Link, useNavigate, useSearchParams } from 'react-router'
import { routeQuery } from '../api/query'
import { ApiProblem } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { Button, buttonClass } from '../ui/button'
import { Drawing } from '../ui/drawing'
import { Field, focusFirstWrong } from '../ui/field'
import { Notice } from '../ui/notice'
import { homeOf } from './home'
import { useSignIn } from './queries'
import { returnPath } from './return-path'

const GOOGLE_SAID: Record<string, string> = {
  refused: 'Google did not sign you in. Nothing was changed; try again or use your e-mail.',
  unconfirmed: 'That Google account has no confirmed address. Use your e-mail and a password.',
}

export default function SignInPage() {
  useTitle('Sign in – Marram')
  const [query] = useSearchParams()
  const navigate = useNavigate()
  const form = useRef<HTMLFormElement>(null)
  const [email, setEmail] = useState('')
  const [password, setPassword] = useState('')
  const [problem, setProblem] = useState<ApiProblem | null>(null)
  const signIn = useSignIn()
  const to = returnPath(query.get('to'))
  const google = GOOGLE_SAID[query.get('google') ?? '']

  const go = async (body: { email: string; password: string }) => {
    setProblem(null)
    try {
      const session = await signIn.mutateAsync(body)
      await navigate(to ?? homeOf(session))
    } catch (error) {
      if (error instanceof ApiProblem) setProblem(error)
      focusFirstWrong(form.current)
    }
  }
  const submit = (event: SubmitEvent) => {
    event.preventDefault()
    void go({ email, password })
  }

  return (
    <main id="main" className="wrap narrow">
      <div className="cols paycols pt-12">
        <div className="panel">
          <form className="pad" ref={form} onSubmit={submit} noValidate aria-label="Sign in">
            <h1 className="mb-4">Sign in</h1>
            {google && <Notice kind="flag">{google}</Notice>}
            {problem && Object.keys(problem.fields).length === 0 && (
              <div className="mb-4">
                <Notice kind="flag">{problem.message}</Notice>
              </div>
            )}
            <a className={buttonClass({ isWide: true })} href={paths.google(to ?? '/')}>
              <Drawing of="person" />
              Continue with Google
            </a>
            <p className="or">
              <span>or</span>
            </p>
            <Field
              label="E-mail"
              type="email"
              autoComplete="email"
              value={email}
              onChange={(event) => setEmail(event.target.value)}
              error={problem?.fields['email']}
            />
            <Field
              label="Password"
              type="password"
              autoComplete="current-password"
              value={password}
              onChange={(event) => setPassword(event.target.value)}
              error={problem?.fields['password']}
            />
            <Button
              type="submit"
              kind="go"
              isWide
              isBig
              waiting={signIn.isPending && 'Signing in…'}
            >
              Sign in
            </Button>
            <p className="mt-4">
              <Link to={paths.forgotten()}>Forgotten your password?</Link>
            </p>
          </form>
        </div>
        <DemoPeople onPick={(body) => void go(body)} />
      </div>
    </main>
  )
}

function DemoPeople({ onPick }: { onPick: (body: { email: string; password: string }) => void }) {
  const demo = useQuery({ ...routeQuery('demo.people', {}), retry: false })
  if (!demo.data) {
    return (
      <div>
        <h2>New here?</h2>
        <p className="lead my-3">
          Take a place in a clinic and your account is made on the way. There is nothing to fill in
          before you have seen a price.
        </p>
        <Link to={paths.open()}>Open an academy of your own</Link>
      </div>
    )
  }
  const { people, password } = demo.data
  return (
    <div>
      <h2>Look around as</h2>
      <p className="soft my-3">Invented people of two invented academies. Press one to sign in.</p>
      <ul className="reg">
        {people.map((person) => (
          <li key={person.email}>
            <button
              type="button"
              className="person"
              onClick={() => onPick({ email: person.email, password })}
            >
              <b>{person.name}</b>
              <small>
                {person.what}, {person.academy}
              </small>
            </button>
          </li>
        ))}
      </ul>
    </div>
  )
}
