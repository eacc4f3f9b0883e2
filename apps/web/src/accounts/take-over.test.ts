import { QueryClient, QueryObserver } from '@tanstack/react-query'
import { expect, it } from 'vitest'
import { SESSION_KEY } from '../api/session-key'
import type { Session } from './queries'
import { takeOver } from './take-over'

const session = (name: string): Session => ({
  token: '',
  account: { id: name, name, email: '', isVerified: true, hasPassword: true },
  memberships: [],
})

it('throws away what was read before, and keeps the session and what the page shows', () => {
  const client = new QueryClient()
  client.setQueryData(['dunes', 'enrolments.mine', '/mine'], 'places of Ada')
  client.setQueryData(['dunes', 'page.clinic', '/clinic'], 'the clinic')
  const onPage = new QueryObserver(client, {
    queryKey: ['dunes', 'page.clinic', '/clinic'],
    queryFn: () => 'the clinic, asked anew',
    staleTime: 'static',
  })
  const leave = onPage.subscribe(() => undefined)

  takeOver(client, session('Bo'))

  expect(client.getQueryData(['dunes', 'enrolments.mine', '/mine'])).toBeUndefined()
  expect(client.getQueryData(['dunes', 'page.clinic', '/clinic'])).toBe('the clinic')
  expect(client.getQueryData(SESSION_KEY)).toEqual(session('Bo'))
  expect(client.getQueryState(SESSION_KEY)?.isInvalidated).toBe(false)
  leave()
})
