import type { QueryClient } from '@tanstack/react-query'
import { redirect, type LoaderFunctionArgs } from 'react-router'
import { paths } from '../paths'
import { homeIn } from './home'
import { rolesIn, sessionQuery } from './queries'

/** The address of the desk leads to the page that the person starts with. */
export const deskHome =
  (client: QueryClient) =>
  async ({ params, request }: LoaderFunctionArgs) => {
    const session = await client.query({ ...sessionQuery, staleTime: 'static' })
    if (!session.account) return redirect(paths.signIn(new URL(request.url).pathname))
    const academy = params['academy'] ?? ''
    return redirect(homeIn(academy, rolesIn(session, academy)))
  }
