/**
 * Waits for questions that were sent one behind the other without waiting in between, and gives
 * their answers. Of several failures the first in their order is thrown: those behind it failed
 * only because the transaction was lost already.
 */
export async function together<T extends readonly unknown[]>(
  ...asked: { [K in keyof T]: Promise<T[K]> }
): Promise<T> {
  const outcomes = await Promise.allSettled(asked)
  const failure = outcomes.find((outcome) => outcome.status === 'rejected')
  if (failure) throw failure.reason
  // None was rejected, so each has the value that its promise promised, in the order of T.
  const answers: unknown[] = outcomes.map((outcome) =>
    outcome.status === 'fulfilled' ? outcome.value : undefined,
  )
  return answers as never
}
