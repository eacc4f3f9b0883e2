import { expect, it } from 'vitest'
import { playFirstEvening, sellSeason } from '../tenancy/season'
import { useWorld } from '../support/use-world'

/**
 * With one connection a query that strays from its transaction waits for itself. In production
 * the same query holds up everybody once the pool is full.
 */
const world = await useWorld({ poolSize: 1 })

it('plays through a season without a query outside its transaction', async () => {
  const season = await sellSeason(world)
  world.clock.moveTo(new Date(season.clinic.sessions[0]!.endsAt))
  await playFirstEvening(world, season)
  const { enrolments } = await season.golfer.person.must('enrolments.mine', {
    params: { academy: season.slug },
  })
  expect(enrolments.map(({ state }) => state)).toEqual(['confirmed', 'confirmed'])
}, 60_000)
