import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import type { Answer, Sent } from '@marram/contract'
import { call } from '../api/client'
import { routeQuery } from '../api/query'
import { SESSION_KEY } from '../api/session-key'
import { takeOver } from './take-over'

export type Session = Answer<'session.read'>
export type Membership = Session['memberships'][number]

export const sessionQuery = queryOptions({
  queryKey: SESSION_KEY,
  queryFn: ({ signal }) => call('session.read', { signal }),
  staleTime: 60_000,
})

export const useSession = () => useQuery(sessionQuery)

/** Those whom a demonstration lets anybody be; an academy's own Marram has none. */
export const demoPeopleQuery = () => routeQuery('demo.people', {})

export type Invitation = Answer<'invitations.read'>

/** What an invitation is to, by the secret of its link. It is read with a POST, to keep it secret. */
export const invitationQuery = (token: string) =>
  queryOptions({
    queryKey: ['', 'invitations.read', token],
    queryFn: ({ signal }) => call('invitations.read', { body: { token }, signal }),
    // It says the same until it is taken up, and after that it is gone: it is asked for once.
    staleTime: 'static',
  })

/** The roles of the person in an academy; none for a visitor. */
export function rolesIn(session: Session | undefined, academy: string): Membership['roles'] {
  return session?.memberships.find((entry) => entry.academy.slug === academy)?.roles ?? []
}

/** Signs in, or up: both answer with the new session, which takes over from the one before. */
export function useSignIn() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (body: Sent<'session.sign-in', 'body'>) => call('session.sign-in', { body }),
    onSuccess: (session) => takeOver(client, session),
  })
}

export function useSignUp() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (body: Sent<'accounts.sign-up', 'body'>) => call('accounts.sign-up', { body }),
    onSuccess: (session) => takeOver(client, session),
  })
}

export function useSignOut() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (options: { isEverywhere: boolean }) =>
      call(options.isEverywhere ? 'session.sign-out-everywhere' : 'session.sign-out', {}),
    onSuccess: () => client.clear(),
  })
}
