import type { QueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, useNavigate, useSearchParams } from 'react-router'
import { useForm } from '../api/form'
import { problemOf } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { Button, buttonClass } from '../ui/button'
import { Drawing } from '../ui/drawing'
import { Field } from '../ui/field'
import { Notice } from '../ui/notice'
import { DemoPeople } from './demo-people'
import { homeOf } from './home'
import { demoPeopleQuery, useSignIn } from './queries'
import { returnPath } from './return-path'

const GOOGLE_SAID: Record<string, string> = {
  refused: 'Google did not sign you in. Nothing was changed; try again or use your e-mail.',
  unconfirmed: 'That Google account has no confirmed address. Use your e-mail and a password.',
}

export const loader = (client: QueryClient) => () =>
  // Only a demonstration has people to look around as.
  client.query(demoPeopleQuery()).catch(() => undefined)

export default function SignInPage() {
  useTitle('Sign in – Marram')
  const [query] = useSearchParams()
  const navigate = useNavigate()
  const [email, setEmail] = useState('')
  const [password, setPassword] = useState('')
  const signIn = useSignIn()
  const to = returnPath(query.get('to'))
  const google = GOOGLE_SAID[query.get('google') ?? '']

  const enter = async (body: { email: string; password: string }) => {
    const session = await signIn.mutateAsync(body)
    await navigate(to ?? homeOf(session))
  }
  const { form, errors, sentence, refuse } = useForm(() => enter({ email, password }), {
    beside: ['email', 'password'],
  })
  const lookAround = (body: { email: string; password: string }) => {
    refuse(null)
    enter(body).catch((error: unknown) => refuse(problemOf(error)))
  }

  return (
    <main id="main" className="wrap narrow">
      <div className="cols paycols pt-12">
        <div className="panel">
          <form {...form} className="pad" aria-label="Sign in">
            <h1 className="mb-4">Sign in</h1>
            {google && <Notice kind="flag">{google}</Notice>}
            {sentence && (
              <div className="mb-4">
                <Notice kind="flag">{sentence}</Notice>
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
              error={errors['email']}
            />
            <Field
              label="Password"
              type="password"
              autoComplete="current-password"
              value={password}
              onChange={(event) => setPassword(event.target.value)}
              error={errors['password']}
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
        <DemoPeople onPick={lookAround} />
      </div>
    </main>
  )
}
