import { beforeAll, expect, it, vi } from 'vitest'
import { connect } from '../../apps/api/src/platform/db/connect'
import type * as Queries from '../../apps/api/src/enrolments/queries'
import { openAcademy, type OpenAcademy, type SignedUp } from '../support/builders'
import { useWorld } from '../support/use-world'
import { gatherGolfers, hotClinic, readSeats, rushFor, wrongSeats } from './hot-clinic/rush'

/**
 * The rush again, with the guard taken out: seats are taken without their condition, as a careful
 * look beforehand seems to allow. What is left of the code is the product's own.
 */
vi.mock(
  import('../../apps/api/src/enrolments/queries'),
  async (original) =>
    ({
      ...(await original()),
      takeSeats: async (trx, { sessionIds, as }) => {
        await trx.raw(`UPDATE sessions SET ${as} = ${as} + 1 WHERE id = ANY(?)`, [[...sessionIds]])
        return [...sessionIds]
      },
    }) satisfies Partial<typeof Queries>,
)

const world = await useWorld({ poolSize: 8 })
let academy: OpenAcademy
let golfers: SignedUp[]

beforeAll(async () => {
  academy = await openAcademy(world)
  golfers = await gatherGolfers(world, 60)
}, 120_000)

it('is refused by the database itself, which knows how many seats there are', async () => {
  const clinic = await hotClinic(academy, { round: 0 })
  const { held, refused } = await rushFor(academy, clinic, golfers)

  expect(held).toHaveLength(12)
  expect(wrongSeats(await readSeats(world, clinic))).toBeNull()
  // Nobody was told in words: without the condition the constraint stops them, as an error.
  expect(refused.some(({ code }) => code === 'unexpected')).toBe(true)
  const constraints = world.takeErrors().map(({ err }) => err?.constraint)
  expect(new Set(constraints)).toEqual(new Set(['sessions_never_oversold']))
}, 120_000)

it('sells more places than there are once the constraint is gone too', async () => {
  const superuser = connect({ url: world.database.superuserUrl, poolSize: 1, name: 'tests' })
  await superuser.raw('ALTER TABLE sessions DROP CONSTRAINT sessions_never_oversold')
  await superuser.destroy()
  const clinic = await hotClinic(academy, { round: 1 })
  const { held } = await rushFor(academy, clinic, golfers)

  expect(held.length).toBeGreaterThan(12)
  expect(wrongSeats(await readSeats(world, clinic))).toMatch(/places were sold of 12/)
}, 120_000)
