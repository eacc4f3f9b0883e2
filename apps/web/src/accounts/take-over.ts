import type { QueryClient } from '@tanstack/react-query'
import { SESSION_KEY } from '../api/session-key'
import type { Session } from './queries'

/**
 * The answers of before belong to whoever was signed in then. Those that no page shows are thrown
 * away, since a page would show them before it asks; those on the page are asked for anew.
 */
export function takeOver(client: QueryClient, session: Session): void {
  const isOther = ({ queryKey }: { queryKey: readonly unknown[] }) =>
    queryKey[0] !== SESSION_KEY[0] || queryKey[1] !== SESSION_KEY[1]
  client.setQueryData(SESSION_KEY, session)
  client.removeQueries({ type: 'inactive', predicate: isOther })
  void client.invalidateQueries({ predicate: isOther })
}
