interface Asked {
  error: Error | null
  isLoadingError: boolean
  refetch: () => Promise<unknown>
}

/**
 * Several questions that one page needs all answers of: the first refusal, and one press that asks
 * again what was refused. What was answered before and could not be asked anew still stands.
 */
export function together(...queries: readonly Asked[]) {
  const failed = queries.filter(({ isLoadingError }) => isLoadingError)
  return {
    error: failed[0]?.error ?? null,
    retry: () => {
      for (const query of failed) void query.refetch()
    },
  }
}
