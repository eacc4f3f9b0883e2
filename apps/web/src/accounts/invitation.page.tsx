import { useQuery, useQueryClient, type QueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { useNavigate } from 'react-router'
import { call } from '../api/client'
import { useForm } from '../api/form'
import { sentenceOf } from '../api/problem'
import { useTitle } from '../layouts/accent'
import { paths } from '../paths'
import { Button } from '../ui/button'
import { Notice } from '../ui/notice'
import { ErrorState, SkeletonRows } from '../ui/states'
import { homeIn } from './home'
import { forgetLinkSecret, takeLinkSecret } from './link-secret'
import { invitationQuery, useSession, type Invitation } from './queries'
import { inRole } from './role-words'
import { SignInFields, useSignInFields } from './sign-in-fields'

export const loader = (client: QueryClient) => () =>
  // What is wrong with it is said on the page.
  client.query(invitationQuery(takeLinkSecret('invitation'))).catch(() => undefined)

/** Takes up an invitation, making the account on the way where there is none. */
export default function InvitationPage() {
  useTitle('An invitation – Marram')
  const [token] = useState(() => takeLinkSecret('invitation'))
  const invitation = useQuery(invitationQuery(token))
  return (
    <main id="main" className="wrap narrow">
      <div className="panel my-12 max-w-[34rem]">
        <div className="pad">
          {invitation.isPending && <SkeletonRows rows={3} />}
          {invitation.isError && (
            <ErrorState
              sentence={sentenceOf(invitation.error)}
              onRetry={() => void invitation.refetch()}
            />
          )}
          {invitation.data && <TakeUp token={token} invitation={invitation.data} />}
        </div>
      </div>
    </main>
  )
}

function TakeUp({ token, invitation }: { token: string; invitation: Invitation }) {
  const { academyName, email, role } = invitation
  const navigate = useNavigate()
  const client = useQueryClient()
  const { data: session } = useSession()
  const fields = useSignInFields()
  const takeUp = async () => {
    if (!session?.account) await fields.submit()
    const { slug, role: taken } = await call('invitations.accept', { body: { token } })
    forgetLinkSecret('invitation')
    await client.invalidateQueries()
    await navigate(homeIn(slug, [taken]))
  }
  const { form, errors, sentence, isSending } = useForm(takeUp, { beside: ['account'] })
  return (
    <form {...form}>
      <h1 className="mb-3">{academyName}</h1>
      <p className="lead mb-4">
        {email} is invited {inRole(role)}.
      </p>
      {sentence && (
        <div className="mb-4">
          <Notice kind="flag">{sentence}</Notice>
        </div>
      )}
      {!session?.account && (
        <SignInFields fields={fields} errors={errors} returnTo={paths.invitation()} />
      )}
      <Button type="submit" kind="go" isWide isBig waiting={isSending && 'Joining…'}>
        Join {academyName}
      </Button>
    </form>
  )
}
