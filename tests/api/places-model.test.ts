import fc from 'fast-check'
import { afterAll, expect, it } from 'vitest'
import { connect } from '../../apps/api/src/platform/db/connect'
import { signUp } from '../support/builders'
import { useWorld } from '../support/use-world'
import type { Step } from './places-model/commands'
import { checkEnd, checkLaws } from './places-model/laws'
import * as money from './places-model/payments'
import * as places from './places-model/places'
import { rememberNothing } from './places-model/remembered'
import { makeScene, settleEverything, SESSIONS, type Stage } from './places-model/scene'

const IS_DEEP = process.env['MARRAM_DEEP'] === '1'
const RUNS = IS_DEEP ? 200 : 4
const LONGEST = IS_DEEP ? 40 : 24
const GOLFERS = 4

const world = await useWorld()
const db = connect({ url: world.database.superuserUrl, poolSize: 1, name: 'tests' })
afterAll(() => db.destroy())

const who = fc.nat(GOLFERS - 1)
const pick = fc.nat(3)
/** The run itself, or one of its sessions. */
const at = fc.integer({ min: -1, max: SESSIONS - 1 })
const card = fc.constantFrom(money.GOOD_CARD, money.GOOD_CARD, money.DECLINED_CARD)
const delivery = fc.constantFrom<money.Delivery[]>('now', 'twice', 'late')

/** What people do here, each as likely as its number says. */
const STEPS: fc.Arbitrary<Step>[] = [
  ...times(6, fc.record({ who, at }).map(places.hold)),
  ...times(3, fc.record({ who, at }).map(places.wait)),
  ...times(4, fc.record({ pick }).map(money.payNow)),
  ...times(3, fc.record({ pick, isForgotten: fc.boolean() }).map(money.openPage)),
  ...times(3, fc.record({ pick, card, delivery }).map(money.payPage)),
  fc.record({ isReversed: fc.boolean() }).map(money.deliver),
  ...times(2, fc.record({ pick }).map(money.atDesk)),
  ...times(2, fc.record({ pick, share: fc.constantFrom(0.5, 1, 1.5) }).map(money.takeCash)),
  fc.record({ pick }).map(places.letGo),
  ...times(2, fc.record({ pick, isByStaff: fc.boolean() }).map(places.giveUp)),
  fc.record({ at: fc.nat(SESSIONS - 1) }).map(places.callOff),
  fc.record({ choice: fc.constantFrom('credit' as const, 'money' as const) }).map(places.choose),
  ...times(2, fc.record({ minutes: fc.constantFrom(5, 16, 40, 780, 1_560) }).map(money.passTime)),
]

const stage = await makeStage()

/** Runs steps in a new academy, lets everything come to its end, and checks the laws there too. */
async function run(steps: Iterable<Step>): Promise<void> {
  const scene = await makeScene(stage)
  const remembered = rememberNothing()
  // What a run before this one left behind is not this one's.
  world.takeErrors()
  await fc.asyncModelRun(() => ({ model: remembered, real: scene }), steps)
  await settleEverything(scene)
  await checkLaws(scene, remembered)
  await checkEnd(scene)
  expect(world.takeErrors()).toEqual([])
}

it('never takes money without a place, nor sells one twice', { timeout: 1_800_000 }, async () => {
  await fc.assert(
    fc.asyncProperty(fc.commands(STEPS, { maxCommands: LONGEST, size: 'max' }), run),
    { numRuns: RUNS, seed: 20310303, endOnFailure: !IS_DEEP },
  )
})

/** Somebody pays on a forgotten page after the hold has lapsed, and others came meanwhile. */
it.each([0, 1, 2])(
  'follows a payment that came too late, with %i others before',
  async (others) => {
    const comers = [1, 2].slice(0, others)
    await run([
      places.hold({ who: 0, at: 0 }),
      money.openPage({ pick: 0, isForgotten: true }),
      money.passTime({ minutes: 16 }),
      ...comers.flatMap((who) => [places.hold({ who, at: 0 }), money.payNow({ pick: 0 })]),
      money.payPage({ pick: 0, card: money.GOOD_CARD, delivery: 'twice' }),
    ])
  },
)

it.each([
  { how: 'by card', settle: money.payNow({ pick: 0 }) },
  { how: 'at the desk', settle: money.atDesk({ pick: 0 }) },
])('does not bring back a place paid $how and given up, when it is paid again', async (given) => {
  await run([
    places.hold({ who: 0, at: 0 }),
    money.openPage({ pick: 0, isForgotten: true }),
    given.settle,
    places.giveUp({ pick: 0, isByStaff: false }),
    money.payPage({ pick: 0, card: money.GOOD_CARD, delivery: 'now' }),
  ])
})

/** The second payment is heard of by a process whose clock is behind. */
it('gives back what paid for a place, not what came a second time and has gone back', async () => {
  await run([
    places.hold({ who: 0, at: 0 }),
    money.openPage({ pick: 0, isForgotten: true }),
    money.payNow({ pick: 0 }),
    money.passTime({ minutes: -1 }),
    money.payPage({ pick: 0, card: money.GOOD_CARD, delivery: 'now' }),
    places.giveUp({ pick: 0, isByStaff: false }),
  ])
})

async function makeStage(): Promise<Stage> {
  const owner = await signUp(world, { name: 'Owner Halloran' })
  const golfers = []
  for (let count = 0; count < GOLFERS; count += 1) golfers.push(await signUp(world))
  return { world, db, owner, golfers }
}

function times<T>(count: number, one: T): T[] {
  return Array<T>(count).fill(one)
}
