/** Stops with an error when something that must hold does not. Stays on in production. */
export function invariant(condition: unknown, message: string): asserts condition {
  if (!condition) throw new Error(`Invariant broken: ${message}`)
}
