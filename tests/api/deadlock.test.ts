import { expect, it } from 'vitest'
import { lockSession } from '../../apps/api/src/clinics/clinics'
import { inAcademy, type AcademyTrx } from '../../apps/api/src/platform/tenancy/transaction'
import { asSuperuser } from '../support/books'
import { openAcademy } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

/** Resolves once it was called as often as there are parties. */
function meeting(parties: number): () => Promise<void> {
  let arrived = 0
  let open = (): void => undefined
  const all = new Promise<void>((resolve) => (open = resolve))
  return () => {
    arrived += 1
    if (arrived >= parties) open()
    return all
  }
}

const raise = 'UPDATE sessions SET calendar_sequence = calendar_sequence + 1 WHERE id = ?'

it.each([
  [
    'a raw question',
    async (trx: AcademyTrx, sessionId: string) => {
      await trx.raw(raise, [sessionId])
    },
  ],
  [
    'a model',
    async (trx: AcademyTrx, sessionId: string) => {
      await lockSession(trx, sessionId)
      await trx.raw(raise, [sessionId])
    },
  ],
])('runs a transaction again that a deadlock undid in %s', async (_what, touch) => {
  const { slug, clinic } = await openAcademy(world)
  const [one, other] = clinic.sessions.map(({ id }) => id)
  const academyId = await asSuperuser(world, async (db) => {
    const { rows } = await db.raw<{ rows: { academyId: string }[] }>(
      'SELECT academy_id FROM academies WHERE slug = ?',
      [slug],
    )
    return rows[0]!.academyId
  })
  const bothHaveOne = meeting(2)
  let begun = 0
  const crossing = (first: string, second: string) =>
    inAcademy(world.services.db, academyId, async (trx) => {
      begun += 1
      await touch(trx, first)
      await bothHaveOne()
      await touch(trx, second)
    })
  await Promise.all([crossing(one!, other!), crossing(other!, one!)])

  // Under load the one that was undone may meet the other once more.
  expect(begun).toBeGreaterThanOrEqual(3)
  const changes = await asSuperuser(world, async (db) => {
    const { rows } = await db.raw<{ rows: { calendarSequence: number }[] }>(
      'SELECT calendar_sequence FROM sessions WHERE id IN (?, ?)',
      [one!, other!],
    )
    return rows.map(({ calendarSequence }) => calendarSequence)
  })
  expect(changes).toEqual([2, 2])
})
