import { useState, type SubmitEvent } from 'react'
import { useNavigate } from 'react-router'
import { useMutation } from '@tanstack/react-query'
import { call } from '../api/client'
import { sentenceOf } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { Field } from '../ui/field'
import { Notice } from '../ui/notice'
import { toast } from '../ui/toast'

/** Asks for the mail; with the mail's secret in the address, sets the new password. */
export default function ResetPage() {
  useTitle('A new password – Marram')
  const secret = location.hash.slice(1)
  return (
    <main id="main" className="wrap narrow">
      <div className="panel my-12 max-w-[30rem]">
        <div className="pad">{secret ? <Choose secret={secret} /> : <Ask />}</div>
      </div>
    </main>
  )
}

function Ask() {
  const [email, setEmail] = useState('')
  const ask = useMutation({ mutationFn: () => call('accounts.ask-reset', { body: { email } }) })
  const submit = (event: SubmitEvent) => {
    event.preventDefault()
    ask.mutate()
  }
  if (ask.isSuccess) {
    return (
      <Notice kind="ok">
        If {email} has an account, a mail is on its way. Its link works for one hour.
      </Notice>
    )
  }
  return (
    <form onSubmit={submit} noValidate>
      <h1 className="mb-4">A new password</h1>
      {ask.error && <Notice kind="flag">{sentenceOf(ask.error)}</Notice>}
      <Field
        label="E-mail"
        type="email"
        autoComplete="email"
        value={email}
        onChange={(event) => setEmail(event.target.value)}
      />
      <Button type="submit" kind="go" isWide isBig waiting={ask.isPending && 'Asking…'}>
        Send me a link
      </Button>
    </form>
  )
}

function Choose({ secret }: { secret: string }) {
  const [password, setPassword] = useState('')
  const navigate = useNavigate()
  const reset = useMutation({
    mutationFn: () => call('accounts.reset', { body: { token: secret, password } }),
    onSuccess: async () => {
      toast('The new password is set, and you are signed in.')
      await navigate(paths.home())
    },
  })
  const submit = (event: SubmitEvent) => {
    event.preventDefault()
    reset.mutate()
  }
  return (
    <form onSubmit={submit} noValidate>
      <h1 className="mb-4">Choose a new password</h1>
      {reset.error && <Notice kind="flag">{sentenceOf(reset.error)}</Notice>}
      <Field
        label="New password"
        type="password"
        autoComplete="new-password"
        hint="Twelve characters or more. It signs you out everywhere else."
        value={password}
        onChange={(event) => setPassword(event.target.value)}
      />
      <Button type="submit" kind="go" isWide isBig waiting={reset.isPending && 'Setting…'}>
        Set the password
      </Button>
    </form>
  )
}
