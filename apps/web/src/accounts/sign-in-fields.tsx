import { useState } from 'react'
import { asPart } from '../api/as-part'
import { paths } from '../paths'
import { Drawing } from '../ui/drawing'
import { Field } from '../ui/field'
import { buttonClass } from '../ui/button'
import { useSignUp } from './queries'

export interface SignInFieldsState {
  name: string
  email: string
  password: string
  set: (change: Partial<{ name: string; email: string; password: string }>) => void
  /** Signs up, or in: the same address and password serve both. Its fields are wrong as `account`. */
  submit: () => Promise<unknown>
}

export function useSignInFields(): SignInFieldsState {
  const [fields, setFields] = useState({ name: '', email: '', password: '' })
  const signUp = useSignUp()
  return {
    ...fields,
    set: (change) => setFields((had) => ({ ...had, ...change })),
    submit: () => asPart('account', signUp.mutateAsync(fields)),
  }
}

/** Name, e-mail and password, or Google, in the same step as whatever needs them. */
export function SignInFields(props: {
  fields: SignInFieldsState
  errors: Readonly<Record<string, string>>
  returnTo: string
}) {
  const { fields, errors } = props
  return (
    <>
      <a className={buttonClass({ isWide: true })} href={paths.google(props.returnTo)}>
        <Drawing of="person" />
        Continue with Google
      </a>
      <p className="or">
        <span>or</span>
      </p>
      <Field
        label="Your name"
        autoComplete="name"
        value={fields.name}
        onChange={(event) => fields.set({ name: event.target.value })}
        error={errors['account.name']}
      />
      <Field
        label="E-mail"
        type="email"
        autoComplete="email"
        value={fields.email}
        onChange={(event) => fields.set({ email: event.target.value })}
        error={errors['account.email']}
      />
      <Field
        label="Password"
        type="password"
        autoComplete="current-password"
        hint="Been here before? Your old password signs you in. New? Twelve characters or more make your account."
        value={fields.password}
        onChange={(event) => fields.set({ password: event.target.value })}
        error={errors['account.password']}
      />
    </>
  )
}
