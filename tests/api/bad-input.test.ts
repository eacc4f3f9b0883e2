import { ROUTES, SCHEMAS, pathOf, type RouteKey } from '@marram/contract'
import fc from 'fast-check'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Reply } from '../support/person'
import { useWorld } from '../support/use-world'
import { fingerprint } from '../tenancy/fingerprint'
import { SAMPLES, type TenantRoute } from '../tenancy/samples'
import type { Season } from '../tenancy/season'
import { playTwoSeasons } from '../tenancy/two-seasons'
import { BROKEN, spoiling } from './spoil'

const BODIES = process.env['MARRAM_DEEP'] ? 5_000 : 500
const SEED = 20_310_303
const SECRET = 'A'.repeat(43)

type Json = Parameters<Parameters<typeof spoiling.map>[0]>[0] extends (body: infer B) => unknown
  ? B
  : never

interface Target {
  key: RouteKey
  params: Record<string, string>
  body: Json
}

/** A body for each route that is no academy's. */
const PLAIN: Partial<Record<RouteKey, Json>> = {
  'session.sign-in': { email: 'orla@mail.example', password: 'salt wind and fescue' },
  'accounts.sign-up': {
    name: 'Orla Tarrant',
    email: 'orla@mail.example',
    password: 'salt wind and fescue',
  },
  'accounts.verify': { token: SECRET },
  'accounts.ask-reset': { email: 'orla@mail.example' },
  'accounts.reset': { token: SECRET, password: 'salt wind and fescue' },
  'academies.open': {
    name: 'Skerrow',
    place: 'Skerrow',
    slug: 'skerrow',
    zone: 'Europe/Dublin',
    currency: 'EUR',
    taxMode: 'included',
  },
  'invitations.read': { token: SECRET },
  'invitations.accept': { token: SECRET },
}

const withBody = (Object.keys(ROUTES) as RouteKey[]).filter((key) => 'body' in SCHEMAS[key])
const isTenant = (key: RouteKey): key is TenantRoute => key in SAMPLES

const world = await useWorld({ poolSize: 4 })
let ours: Season
const targets = new Map<RouteKey, Target>()

beforeAll(async () => {
  ;({ ours } = await playTwoSeasons(world))
  for (const key of withBody) {
    const { params, body } = isTenant(key)
      ? await SAMPLES[key](ours, world)
      : { params: {}, body: PLAIN[key] }
    // What is sent is JSON; a sample's own type no longer matters.
    targets.set(key, { key, params: { ...params, academy: ours.slug }, body: body as Json })
  }
  await world.drain()
}, 120_000)

it('has a body of every route that takes one', () => {
  expect(withBody.filter((key) => targets.get(key)?.body === undefined)).toEqual([])
})

const send = ({ key, params }: Target, body: unknown, headers?: Record<string, string>) =>
  ours.owner.person.send(ROUTES[key].method, pathOf(key, params), body, headers)

function isFit({ key }: Target, body: Json): boolean {
  const schemas = SCHEMAS[key] as { body: { safeParse(body: unknown): { success: boolean } } }
  return schemas.body.safeParse(body).success
}

function expectRefusal({ status, problem, text }: Reply<unknown>): void {
  expect(status, text).toBeGreaterThanOrEqual(400)
  expect(status, text).toBeLessThan(500)
  expect(problem?.code, text).toBeTruthy()
  expect(problem?.detail, text).toMatch(/\S/)
}

describe('what is not fit is refused in words, and nothing is written', () => {
  it('bodies with one thing wrong', async () => {
    const before = await fingerprint(world.database)
    let refused = 0
    await fc.assert(
      fc.asyncProperty(fc.constantFrom(...withBody), spoiling, async (key, spoil) => {
        const target = targets.get(key)!
        const body = spoil(target.body)
        fc.pre(!isFit(target, body))
        // A text goes out as it is; here it is meant as JSON.
        expectRefusal(await send(target, JSON.stringify(body)))
        refused += 1
      }),
      { numRuns: BODIES, seed: SEED, maxSkipsPerRun: 1_000 },
    )
    expect(refused).toBe(BODIES)
    expect(await fingerprint(world.database)).toEqual(before)
  })

  it.each(BROKEN)('a body that is $name', async ({ body, type }) => {
    const before = await fingerprint(world.database)
    for (const target of targets.values()) {
      expectRefusal(await send(target, body, type ? { 'content-type': type } : {}))
    }
    expect(await fingerprint(world.database)).toEqual(before)
  })

  it.each([
    { name: 'a line break', part: '%0d%0aset-cookie:x=1' },
    { name: 'a NUL', part: '%00' },
    { name: 'half a character', part: '%ff' },
    { name: 'a way upwards', part: '..%2f..%2fetc' },
    { name: 'four thousand letters', part: 'x'.repeat(4_000) },
  ])('an address with $name in it', async ({ part }) => {
    for (const key of Object.keys(ROUTES) as RouteKey[]) {
      const { method, path } = ROUTES[key]
      // Whether an address is free may be asked of any text: the answer is how it would be written.
      if (!path.includes(':') || key === 'academies.check-slug') continue
      const body = method === 'GET' ? undefined : {}
      expectRefusal(await ours.owner.person.send(method, path.replace(/:\w+/g, part), body))
    }
  })
})

it('what is fit by its shape and absurd by its sense never breaks the product', async () => {
  await fc.assert(
    fc.asyncProperty(fc.constantFrom(...withBody), spoiling, async (key, spoil) => {
      const target = targets.get(key)!
      const body = spoil(target.body)
      fc.pre(key !== 'academies.publish' && isFit(target, body))
      const { status, text } = await send(target, JSON.stringify(body))
      expect(status, `${key} ${JSON.stringify(body).slice(0, 300)} ${text}`).toBeLessThan(500)
    }),
    { numRuns: BODIES / 5, seed: SEED, maxSkipsPerRun: 1_000 },
  )
})
