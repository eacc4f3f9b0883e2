import type { Knex } from 'knex'
import {
  openAcademy,
  type ClinicView,
  type OpenAcademy,
  type SignedUp,
} from '../../support/builders'
import { WORLD_BEGINS, type World } from '../../support/world'

/** What stays over all runs of the model: a world, its people, and a look into its database. */
export interface Stage {
  world: World
  db: Knex
  owner: SignedUp
  golfers: SignedUp[]
}

/** An academy with few places and several golfers, new for each run of the model. */
export interface Scene extends Stage {
  academy: OpenAcademy
  academyId: string
  /** The academy's account at the provider. */
  account: string
  clinic: ClinicView
  params: { academy: string }
}

export const RUN_SHARE_MINOR = 3_000
export const DROP_IN_MINOR = 3_500
export const SESSIONS = 3
export const CAPACITY = 2

/** Three evenings from Thursday for two golfers, seen from the Monday before. */
export async function makeScene(stage: Stage): Promise<Scene> {
  const { world, db, owner } = stage
  world.clock.moveTo(WORLD_BEGINS)
  const academy = await openAcademy(world, {
    owner,
    clinic: {
      capacity: CAPACITY,
      startsOnLocal: '2031-03-06',
      rrule: `FREQ=DAILY;COUNT=${SESSIONS}`,
      runPriceMinor: RUN_SHARE_MINOR * SESSIONS,
      dropInPriceMinor: DROP_IN_MINOR,
    },
  })
  await world.drain()
  const row = await db('academies')
    .where({ slug: academy.slug })
    .first<{ academyId: string; paymentsAccount: string }>('academyId', 'paymentsAccount')
  return {
    ...stage,
    academy,
    academyId: row.academyId,
    account: row.paymentsAccount,
    clinic: academy.clinic,
    params: { academy: academy.slug },
  }
}

/** Lets everything come to its end: late deliveries, holds, offers, and choices not made. */
export async function settleEverything({ world }: Scene): Promise<void> {
  world.payments.release()
  await world.drain()
  // Whoever gets an offer when another lapses lets it pass too.
  for (let days = 0; days < 10; days += 1) {
    world.clock.moveBy(86_400_000)
    await world.sweep()
  }
}
