import { Problem } from './errors'
import type { Services } from './services'

const WINDOW_MINUTES = 10

/**
 * Counts an attempt by a subject ("sign-in from 127.0.0.1") in the current ten minutes, across all
 * processes. Throws `too-many-attempts` above the limit.
 */
export async function countAttempt(
  { db, clock }: Pick<Services, 'db' | 'clock'>,
  { subject, limit }: { subject: string; limit: number },
): Promise<void> {
  const windowMs = WINDOW_MINUTES * 60_000
  const windowStartsAt = new Date(Math.floor(clock.now().getTime() / windowMs) * windowMs)
  const { rows } = await db.raw<{ rows: { count: number }[] }>(
    `INSERT INTO attempts (subject, window_starts_at, count) VALUES (?, ?, 1)
     ON CONFLICT (subject, window_starts_at) DO UPDATE SET count = attempts.count + 1
     RETURNING count`,
    [subject, windowStartsAt],
  )
  if ((rows[0]?.count ?? 0) > limit) {
    throw new Problem(
      'too-many-attempts',
      `Too many attempts. Please wait ${WINDOW_MINUTES} minutes and try again.`,
    )
  }
}
