import type { EventName, OutboxEvents } from '../../apps/api/src/platform/outbox/events'
import { inAcademy } from '../../apps/api/src/platform/tenancy/transaction'
import { findAcademyBySlug } from '../../apps/api/src/platform/tenancy/look-ups'
import type { World } from './world'

/** Tells an academy's listeners the same thing once more, as a queue that delivers twice does. */
export async function tellAgain<E extends EventName>(
  world: World,
  academy: { slug: string },
  event: E,
  about: Omit<OutboxEvents[E], 'academyId'>,
): Promise<void> {
  const { db, outbox } = world.services
  const academyId = await academyIdOf(world, academy)
  // With the academy's id it is whole again.
  const payload = { academyId, ...about } as unknown as OutboxEvents[E]
  await inAcademy(db, academyId, (trx) => outbox.emit(trx, event, payload))
  await world.drain()
}

export async function academyIdOf(world: World, { slug }: { slug: string }): Promise<string> {
  const academyId = await findAcademyBySlug(world.services.db, slug)
  if (!academyId) throw new Error(`there is no academy ${slug}`)
  return academyId
}
