import type { AcademyTrx } from '../platform/tenancy/transaction'

/** Places of a called-off session that are still to be decided on, with who decides. */
export async function listUndecided(
  trx: AcademyTrx,
  sessionId: string,
): Promise<{ placeId: string; accountId: string }[]> {
  const { rows } = await trx.raw<{ rows: { placeId: string; accountId: string }[] }>(
    `SELECT o.place_id, coalesce(g.account_id, g.guardian_account_id) AS account_id
     FROM owed_places o
     JOIN places p ON p.academy_id = o.academy_id AND p.id = o.place_id
     JOIN golfers g ON g.academy_id = p.academy_id AND g.id = p.golfer_id
     WHERE p.session_id = ? AND o.choice IS NULL ORDER BY p.id`,
    [sessionId],
  )
  return rows
}

/** The checkout of an enrolment's order, and the account it is on. */
export async function findCheckout(
  trx: AcademyTrx,
  enrolmentId: string,
): Promise<{ checkoutId: string; account: string } | undefined> {
  const { rows } = await trx.raw<{ rows: { checkoutId: string; account: string }[] }>(
    `SELECT o.checkout_id, a.payments_account AS account
     FROM orders o JOIN academies a ON a.academy_id = o.academy_id
     WHERE o.enrolment_id = ? AND o.state = 'open'`,
    [enrolmentId],
  )
  return rows[0]
}
