/** What the model itself works out, for the laws to hold against the product's books. */
export interface Remembered {
  /** By enrolment: what the policy keeps of places that were given up. */
  keptMinor: Map<string, number>
  /** By enrolment: what is still to be paid at the desk. */
  deskMinor: Map<string, number>
}

export const rememberNothing = (): Remembered => ({ keptMinor: new Map(), deskMinor: new Map() })

const HOUR_MS = 3_600_000

/** The policy that every academy starts with: all of it, half of it, nothing. */
export function backOf(grossMinor: number, noticeMs: number): number {
  if (noticeMs >= 48 * HOUR_MS) return grossMinor
  return noticeMs >= 24 * HOUR_MS ? Math.ceil(grossMinor / 2) : 0
}

/** Takes an amount off what is still to be paid at the desk; resolves to what is left over. */
export function forgive(
  { deskMinor }: Remembered,
  { enrolmentId, amountMinor }: { enrolmentId: string; amountMinor: number },
): number {
  const owed = deskMinor.get(enrolmentId) ?? 0
  const off = Math.min(owed, amountMinor)
  if (deskMinor.has(enrolmentId)) deskMinor.set(enrolmentId, owed - off)
  return amountMinor - off
}
