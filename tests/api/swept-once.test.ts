import { expect, it } from 'vitest'
import { connect } from '../../apps/api/src/platform/db/connect'
import { sweepDue } from '../../apps/api/src/platform/outbox/sweep'
import { asSuperuser } from '../support/books'
import { useWorld } from '../support/use-world'
import { holdRun, justAfter, readEnrolment } from './payment/paying'

const world = await useWorld()

const countWaiting = () =>
  asSuperuser(world, async (db) => {
    const { rows } = await db.raw<{ rows: { count: number }[] }>(
      `SELECT count(*) FROM pgboss.job
       WHERE name = 'checkout.hold.lapsed' AND state IN ('created', 'retry', 'active')`,
    )
    return rows[0]!.count
  })

it('lets one job wait for each thing that is due, however often the sweep finds it', async () => {
  const holds = [await holdRun(world), await holdRun(world)]
  world.clock.moveTo(justAfter(holds[1]!))
  const dispatch = connect({ url: world.database.dispatchUrl, poolSize: 1, name: 'tests' })
  try {
    for (let sweep = 1; sweep <= 3; sweep += 1) {
      expect(await sweepDue(world.services, dispatch)).toBe(2)
      expect(await countWaiting()).toBe(2)
    }
  } finally {
    await dispatch.destroy()
  }
  await world.drain()
  expect(await countWaiting()).toBe(0)
  for (const hold of holds) expect((await readEnrolment(hold)).endedBecause).toBe('lapsed')
})
