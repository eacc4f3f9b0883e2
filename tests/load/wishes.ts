import type { Wish } from './bare-hold'
import type { BenchDatabase } from './database'
import { readRows, runAlone } from './fill'

/**
 * Readies a database for holds: every clinic sold by the session, and seats for everybody.
 * Resolves to wishes of which no two are the same, shuffled, so that the next is mostly of another golfer and session.
 */
export async function prepareForHolds({ superuserUrl }: BenchDatabase): Promise<Wish[]> {
  await runAlone(superuserUrl, `UPDATE clinics SET sale_mode = 'both'`)
  await runAlone(superuserUrl, 'UPDATE sessions SET capacity = 10000')
  return readRows<Wish>(
    superuserUrl,
    `SELECT s.academy_id AS "academyId", s.clinic_id AS "clinicId", s.id AS "sessionId",
       g.account_id AS "accountId"
     FROM golfers g JOIN sessions s USING (academy_id)
     WHERE s.starts_at > now() + interval '1 hour' ORDER BY md5(s.id::text || g.id)`,
  )
}

/** Takes every hold back, so that each round begins with tables of the same size. */
export async function forgetHolds({ superuserUrl }: BenchDatabase): Promise<void> {
  await runAlone(superuserUrl, 'TRUNCATE enrolments, places, consents CASCADE')
  await runAlone(superuserUrl, 'UPDATE sessions SET held = 0')
  await runAlone(superuserUrl, 'VACUUM sessions')
}
