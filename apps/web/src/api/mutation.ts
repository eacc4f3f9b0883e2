import { useMutation, useQueryClient } from '@tanstack/react-query'
import { ApiProblem } from './problem'
import { SESSION_KEY } from './session-key'

const CONFLICT = 409

/**
 * A change in an academy. Everything the academy said is asked for again afterwards, and the session
 * too, which carries the academy's name and the person's roles in it. A change that came too late is
 * a sign that what is shown is old, so the same is done after its refusal.
 */
export function useAcademyMutation<Input, Result>(
  academy: string,
  mutationFn: (input: Input) => Promise<Result>,
) {
  const client = useQueryClient()
  const askAnew = () => client.invalidateQueries({ queryKey: [academy] })
  return useMutation({
    mutationFn,
    onSuccess: () => Promise.all([askAnew(), client.invalidateQueries({ queryKey: SESSION_KEY })]),
    onError: (error) => {
      if (error instanceof ApiProblem && error.status === CONFLICT) void askAnew()
    },
  })
}
