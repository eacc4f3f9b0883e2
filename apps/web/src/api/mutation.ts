import { useMutation, useQueryClient } from '@tanstack/react-query'

/** A change in an academy. Everything the academy said is asked for again afterwards. */
export function useAcademyMutation<Input, Result>(
  academy: string,
  mutationFn: (input: Input) => Promise<Result>,
) {
  const client = useQueryClient()
  return useMutation({
    mutationFn,
    onSuccess: () => client.invalidateQueries({ queryKey: [academy] }),
  })
}
