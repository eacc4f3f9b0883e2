import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { call } from '../api/client'
import { useAcademyMutation } from '../api/mutation'
import { sentenceOf } from '../api/problem'
import { Button, type ButtonKind } from '../ui/button'
import { Notice } from '../ui/notice'
import { ErrorState, SkeletonRows } from '../ui/states'
import { paymentsQuery } from './queries'

/** How the academy is paid: connected, under way, or still to be begun on the provider's page. */
export function ConnectPayments(props: { slug: string; mayConnect: boolean; kind: ButtonKind }) {
  const payments = useQuery(paymentsQuery(props.slug))
  const [error, setError] = useState('')
  const connect = useAcademyMutation(props.slug, () =>
    call('payments.connect', { academy: props.slug }),
  )
  const press = async () => {
    setError('')
    try {
      const { url } = await connect.mutateAsync(undefined)
      location.assign(url)
    } catch (caught) {
      setError(sentenceOf(caught))
    }
  }
  if (payments.isError) {
    return (
      <ErrorState sentence={sentenceOf(payments.error)} onRetry={() => void payments.refetch()} />
    )
  }
  const { data } = payments
  if (!data) return <SkeletonRows rows={1} />
  if (data.state === 'ready') {
    return (
      <Notice kind="ok">Connected. Golfers can pay by card, on the provider’s own page.</Notice>
    )
  }
  return (
    <>
      <p className="mb-3">
        {data.state === 'started'
          ? 'The provider still needs something from you. Until then golfers can pay at the desk.'
          : 'You connect the payment provider on its own page. Until then golfers can pay at the desk. About a minute.'}
      </p>
      {error && <Notice kind="flag">{error}</Notice>}
      {props.mayConnect ? (
        <Button
          kind={props.kind}
          waiting={connect.isPending && 'Going there…'}
          onClick={() => void press()}
        >
          {data.state === 'started' ? 'Go on with the provider' : 'Connect payments'}
        </Button>
      ) : (
        <p className="soft">Only an owner can connect it.</p>
      )}
    </>
  )
}
