import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { useState, type SubmitEvent } from 'react'
import { useNavigate } from 'react-router'
import { call } from '../api/client'
import { sentenceOf } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { SkeletonRows } from '../ui/states'
import { useSession } from './queries'
import { SignInFields, useSignInFields } from './sign-in-fields'

/** Takes up an invitation, making the account on the way where there is none. */
export default function InvitationPage() {
  useTitle('An invitation – Marram')
  const token = location.hash.slice(1)
  const navigate = useNavigate()
  const client = useQueryClient()
  const { data: session } = useSession()
  const fields = useSignInFields()
  const [error, setError] = useState('')
  const invitation = useQuery({
    queryKey: ['', 'invitation', token],
    queryFn: () => call('invitations.read', { body: { token } }),
    retry: false,
  })
  const accept = useMutation({
    mutationFn: async () => {
      if (!session?.account) await fields.submit()
      return call('invitations.accept', { body: { token } })
    },
    onSuccess: async ({ slug, role }) => {
      await client.invalidateQueries()
      await navigate(role === 'coach' ? paths.today(slug) : paths.week(slug))
    },
    onError: (caught) => setError(sentenceOf(caught)),
  })
  const submit = (event: SubmitEvent) => {
    event.preventDefault()
    setError('')
    accept.mutate()
  }
  return (
    <main id="main" className="wrap narrow">
      <div className="panel my-12 max-w-[34rem]">
        <form className="pad" onSubmit={submit} noValidate>
          {invitation.isPending && <SkeletonRows rows={3} />}
          {invitation.error && <Notice kind="flag">{sentenceOf(invitation.error)}</Notice>}
          {invitation.data && (
            <>
              <h1 className="mb-3">{invitation.data.academyName}</h1>
              <p className="lead mb-4">
                {invitation.data.email} is invited as {invitation.data.role}.
              </p>
              {error && <Notice kind="flag">{error}</Notice>}
              {!session?.account && (
                <SignInFields fields={fields} errors={{}} returnTo={`/invitation#${token}`} />
              )}
              <Button type="submit" kind="go" isWide isBig waiting={accept.isPending && 'Joining…'}>
                Join {invitation.data.academyName}
              </Button>
            </>
          )}
        </form>
      </div>
    </main>
  )
}
