import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query'
import { ApiProblem } from './problem'
import { SESSION_KEY } from './session-key'

const MOST_RETRIES = 2

export const queryClient = new QueryClient({
  queryCache: new QueryCache({ onError: noticeSignedOut }),
  mutationCache: new MutationCache({ onError: noticeSignedOut }),
  defaultOptions: {
    // Without a connection a press fails and says so. The library's own way is to wait, and to send
    // a payment or a giving-up by itself, minutes later, when nobody expects it any more.
    mutations: { networkMode: 'always' },
    queries: {
      networkMode: 'always',
      refetchOnReconnect: true,
      staleTime: 5_000,
      // A refusal is an answer; only a broken line is worth another try.
      retry: (count, error) =>
        error instanceof ApiProblem && error.code === 'no-connection' && count < MOST_RETRIES,
    },
  },
})

/** The sign-in has ended elsewhere: asked anew, so that the page can offer it beside what is typed. */
function noticeSignedOut(error: Error): void {
  if (!(error instanceof ApiProblem) || error.code !== 'not-signed-in') return
  void queryClient.invalidateQueries({ queryKey: SESSION_KEY })
}
