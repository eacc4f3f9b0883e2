import { findAcademyBySlug } from '../../apps/api/src/platform/tenancy/look-ups'
import type { World } from '../support/world'
import { playFirstEvening, sellSeason, type Season } from './season'

export interface TwoSeasons {
  ours: Season & { academyId: string }
  theirs: Season & { academyId: string }
}

/** Two academies side by side, each with at least one row in every table. */
export async function playTwoSeasons(world: World): Promise<TwoSeasons> {
  const ours = await sellSeason(world)
  const theirs = await sellSeason(world)
  const [first] = ours.clinic.sessions
  if (!first) throw new Error('a run has a session')
  world.clock.moveTo(new Date(first.endsAt))
  await playFirstEvening(world, ours)
  await playFirstEvening(world, theirs)
  return { ours: await withId(world, ours), theirs: await withId(world, theirs) }
}

async function withId(world: World, season: Season): Promise<Season & { academyId: string }> {
  const academyId = await findAcademyBySlug(world.services.db, season.slug)
  if (!academyId) throw new Error(`${season.slug} is there`)
  return { ...season, academyId }
}
