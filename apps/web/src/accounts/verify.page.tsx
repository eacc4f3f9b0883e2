import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { Link } from 'react-router'
import { call } from '../api/client'
import { sentenceOf } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { Button, buttonClass } from '../ui/button'
import { Notice } from '../ui/notice'
import { forgetLinkSecret, takeLinkSecret } from './link-secret'
import { useSession } from './queries'

/** Confirms an address: only for who is signed in to the account, and only when they press. */
export default function VerifyPage() {
  useTitle('Confirm your address – Marram')
  const [secret] = useState(() => takeLinkSecret('verify'))
  const client = useQueryClient()
  const { data: session, isPending } = useSession()
  const verify = useMutation({
    mutationFn: () => call('accounts.verify', { body: { token: secret } }),
    onSuccess: () => {
      forgetLinkSecret('verify')
      return client.invalidateQueries()
    },
  })
  return (
    <main id="main" className="wrap narrow py-12">
      <h1 className="mb-4">Confirm your address</h1>
      {verify.isSuccess ? (
        <Notice kind="ok">{verify.data.email} is confirmed. Thank you.</Notice>
      ) : isPending ? null : session?.account ? (
        <>
          <p className="lead mb-4">
            You are signed in as {session.account.name}, {session.account.email}. If that is you,
            press the button.
          </p>
          {verify.error && <Notice kind="flag">{sentenceOf(verify.error)}</Notice>}
          <Button
            kind="go"
            isBig
            waiting={verify.isPending && 'Confirming…'}
            onClick={() => verify.mutate()}
          >
            Yes, this address is mine
          </Button>
        </>
      ) : (
        <>
          <p className="lead mb-4">Sign in first, then this link works.</p>
          <Link className={buttonClass({ kind: 'go' })} to={paths.signIn(paths.verify())}>
            Sign in
          </Link>
        </>
      )}
    </main>
  )
}
