import { useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { useNavigate } from 'react-router'
import { call } from '../api/client'
import { useForm } from '../api/form'
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
  const [isAsked, setIsAsked] = useState(false)
  const ask = async () => {
    await call('accounts.ask-reset', { body: { email } })
    setIsAsked(true)
  }
  const { form, errors, sentence, isSending } = useForm(ask, { beside: ['email'] })
  if (isAsked) {
    return (
      <Notice kind="ok">
        If {email} has an account, a mail is on its way. Its link works for one hour.
      </Notice>
    )
  }
  return (
    <form {...form}>
      <h1 className="mb-4">A new password</h1>
      {sentence && <Notice kind="flag">{sentence}</Notice>}
      <Field
        label="E-mail"
        type="email"
        autoComplete="email"
        value={email}
        onChange={(event) => setEmail(event.target.value)}
        error={errors['email']}
      />
      <Button type="submit" kind="go" isWide isBig waiting={isSending && 'Asking…'}>
        Send me a link
      </Button>
    </form>
  )
}

function Choose({ secret }: { secret: string }) {
  const [password, setPassword] = useState('')
  const navigate = useNavigate()
  const client = useQueryClient()
  const reset = async () => {
    await call('accounts.reset', { body: { token: secret, password } })
    // Whoever was signed in here before left nothing for the next.
    client.clear()
    toast('The new password is set, and you are signed in.')
    await navigate(paths.home())
  }
  const { form, errors, sentence, isSending } = useForm(reset, { beside: ['password'] })
  return (
    <form {...form}>
      <h1 className="mb-4">Choose a new password</h1>
      {sentence && <Notice kind="flag">{sentence}</Notice>}
      <Field
        label="New password"
        type="password"
        autoComplete="new-password"
        hint="Twelve characters or more. It signs you out everywhere else."
        value={password}
        onChange={(event) => setPassword(event.target.value)}
        error={errors['password']}
      />
      <Button type="submit" kind="go" isWide isBig waiting={isSending && 'Setting…'}>
        Set the password
      </Button>
    </form>
  )
}
