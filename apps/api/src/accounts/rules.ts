const FREE_TRIES = 4
const FIRST_DELAY_MS = 2_000
const LONGEST_DELAY_MS = 15 * 60_000

export const LINK_HOURS = { verify: 7 * 24, reset: 1 } as const

/** Until when an account takes no more tries after this many failures in a row; null for at once. */
export function nextTryAt(failures: number, now: Date): Date | null {
  if (failures <= FREE_TRIES) return null
  const delay = Math.min(FIRST_DELAY_MS * 2 ** (failures - FREE_TRIES - 1), LONGEST_DELAY_MS)
  return new Date(now.getTime() + delay)
}

/** A link works up to and including the millisecond in which it expires. */
export function isExpired(expiresAt: Date, now: Date): boolean {
  return now.getTime() > expiresAt.getTime()
}

/** Only a path of this site may be gone back to after signing in elsewhere. */
export function checkedReturnPath(path: unknown): string {
  if (typeof path !== 'string' || path.length > 300) return '/'
  const isOurs = /^\/(?![/\\])[\w\-./?=&%#]*$/.test(path)
  return isOurs ? path : '/'
}
