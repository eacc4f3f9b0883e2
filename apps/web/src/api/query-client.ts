import { QueryClient } from '@tanstack/react-query'
import { ApiProblem } from './problem'

const MOST_RETRIES = 2

export const queryClient = new QueryClient({
  defaultOptions: {
    queries: {
      staleTime: 5_000,
      // A refusal is an answer; only a broken line is worth another try.
      retry: (count, error) =>
        error instanceof ApiProblem && error.code === 'no-connection' && count < MOST_RETRIES,
    },
  },
})
