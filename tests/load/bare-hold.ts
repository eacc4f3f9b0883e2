import type pg from 'pg'
import { newId } from '../../apps/api/src/platform/ids'
import { INSERT_HOLD, READ_FOR_HOLD, TAKE_SEAT, beginIn } from './floor-sql'

/** Who wants a place where. */
export interface Wish {
  academyId: string
  clinicId: string
  sessionId: string
  accountId: string
}

interface Facts {
  clinic_id: string
  price_minor: number
  tax_minor: number
  currency: string
  hold_minutes: number
  waiver: string
  golfer_id: string
}

/**
 * A hold of one session as bare SQL, for a golfer who is known already: one question for what it
 * must know, one statement for its rows, the guarded seat. It leaves the same rows as the product,
 * sends at once what does not wait for an answer, and has its statements planned once.
 * `show` may ask about the enrolment in the same burst.
 */
export async function holdBarely<T = null>(
  client: pg.ClientBase,
  wish: Wish,
  show: (enrolmentId: string) => Promise<T | null> = () => Promise.resolve(null),
): Promise<{ id: string; shown: T | null }> {
  const { academyId, sessionId, accountId } = wish
  const ask = <Row extends pg.QueryResultRow>(name: string, text: string, values: unknown[]) =>
    client.query<Row>({ name, text, values })
  try {
    const [, { rows }] = await Promise.all([
      client.query(beginIn(academyId)),
      ask<Facts>('read-for-hold', READ_FOR_HOLD, [academyId, sessionId, accountId]),
    ])
    const [facts] = rows
    if (!facts) throw new Error('There is nothing to hold.')
    const id = newId(new Date())
    const [, shown, { rowCount }] = await Promise.all([
      ask('insert-hold', INSERT_HOLD, rowsOfHold(wish, { facts, id })),
      show(id),
      ask('take-seat', TAKE_SEAT, [academyId, sessionId]),
    ])
    if (rowCount !== 1) throw new Error('The session is full.')
    await client.query('COMMIT')
    return { id, shown }
  } catch (error) {
    await client.query('ROLLBACK')
    throw error
  }
}

function rowsOfHold(
  { academyId, sessionId, accountId }: Wish,
  { facts, id }: { facts: Facts; id: string },
): unknown[] {
  const now = new Date()
  const heldUntil = new Date(now.getTime() + facts.hold_minutes * 60_000)
  const netMinor = facts.price_minor - facts.tax_minor
  const consent = [newId(now), facts.golfer_id, facts.waiver, accountId]
  const enrolment = [id, facts.clinic_id, heldUntil, facts.currency, netMinor, facts.tax_minor]
  return [academyId, ...consent, ...enrolment, newId(now), sessionId]
}
