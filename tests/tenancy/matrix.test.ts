import { ROLES, ROUTES, scopeOf, type Permission, type RouteSpec } from '@marram/contract'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Person } from '../support/person'
import { useWorld } from '../support/use-world'
import { fingerprint } from './fingerprint'
import { SAMPLES, TENANT_ROUTES, type Call, type TenantRoute } from './samples'
import type { Season } from './season'
import { playTwoSeasons } from './two-seasons'

/** Routes that anybody signed in may call at any academy, since they only reach their own rows. */
const OPEN_TO_ANYBODY: TenantRoute[] = ['golfers.mine', 'golfers.add-dependant', 'enrolments.mine']

const world = await useWorld()
let ours: Season
let theirs: Season

beforeAll(async () => {
  ;({ ours, theirs } = await playTwoSeasons(world))
}, 120_000)

const accessOf = (key: TenantRoute): RouteSpec['access'] => ROUTES[key].access
const isPublic = (key: TenantRoute) => accessOf(key) === 'public'
const isOwn = (key: TenantRoute) => accessOf(key) === 'account'
const guarded = TENANT_ROUTES.filter((key) => !isPublic(key) && !isOwn(key))
const closed = TENANT_ROUTES.filter((key) => !isPublic(key) && !OPEN_TO_ANYBODY.includes(key))

/** Whom a season has in each role. */
const personIn = (season: Season, role: (typeof ROLES)[number]): Person =>
  ({
    owner: season.owner,
    desk: season.desk,
    coach: season.coachPerson,
    golfer: season.golfer,
    bookkeeper: season.bookkeeper,
  })[role].person

// Each route has its own shapes; a table of them all can only be called as one of them.
const sampleOf = (key: TenantRoute, season: Season) =>
  SAMPLES[key](season, world) as Promise<Call<'venues.add'>>
const send = (person: Person, key: TenantRoute, academy: string, call: Call<'venues.add'>) =>
  person.call(key as 'venues.add', { ...call, params: { ...call.params, academy } })

const holdsOurId = (part: unknown) => /[0-9a-f]{8}-[0-9a-f]{4}-7/.test(JSON.stringify(part ?? null))

const grants = (key: TenantRoute, role: (typeof ROLES)[number]) =>
  scopeOf([role], accessOf(key) as Permission)

it('has a sample of every route of an academy', () => {
  expect(Object.keys(SAMPLES).sort()).toEqual([...TENANT_ROUTES].sort())
})

describe('what is refused', () => {
  const calls = new Map<TenantRoute, Call<'venues.add'>>()
  let before: Record<string, string>

  beforeAll(async () => {
    for (const key of TENANT_ROUTES) calls.set(key, await sampleOf(key, ours))
    await world.drain()
    before = await fingerprint(world.database)
  }, 120_000)

  const callOf = (key: TenantRoute) => calls.get(key) ?? {}

  it.each(closed)("%s: another academy's owner finds nothing here", async (key) => {
    const reply = await send(theirs.owner.person, key, ours.slug, callOf(key))
    expect(reply.status).toBe(404)
    expect(reply.problem?.code).toBe('not-found')
  })

  it.each(guarded)('%s: an academy that is not there looks the same', async (key) => {
    const here = await send(theirs.owner.person, key, ours.slug, callOf(key))
    const nowhere = await send(theirs.owner.person, key, 'no-such-links', callOf(key))
    expect({ ...here.problem, requestId: '' }).toEqual({ ...nowhere.problem, requestId: '' })
  })

  it.each(closed)("%s: our ids mean nothing in another academy's path", async (key) => {
    const call = callOf(key)
    // Without one of our ids it is their own affair.
    if (!holdsOurId(call)) return
    const reply = await send(theirs.owner.person, key, theirs.slug, call)
    if (holdsOurId(call.params)) expect(reply.status).toBe(404)
    // A form answers beside the field that it cannot use.
    else if (holdsOurId(call.body)) expect([404, 422]).toContain(reply.status)
    // A filter that fits nothing gives nothing.
    else expect(reply.answer).toEqual({ totalMinor: 0, transfers: [] })
  })

  it.each(TENANT_ROUTES.filter((key) => !isPublic(key)))('%s: signed out', async (key) => {
    const reply = await send(world.person(), key, ours.slug, callOf(key))
    expect(reply.status).toBe(401)
    expect(reply.problem?.code).toBe('not-signed-in')
  })

  it.each(guarded)('%s: roles that it is not granted to', async (key) => {
    for (const role of ROLES.filter((each) => !grants(key, each))) {
      const reply = await send(personIn(ours, role), key, ours.slug, callOf(key))
      expect({ role, status: reply.status, code: reply.problem?.code }).toEqual({
        role,
        status: 403,
        code: 'not-allowed',
      })
    }
  })

  const ofOwnSessions = guarded.filter((key) => {
    const hasId = /:(?!academy)\w+Id/.test(ROUTES[key].path)
    return hasId && grants(key, 'coach') === 'own'
  })
  it.each(ofOwnSessions)("%s: another coach's sessions and golfers", async (key) => {
    const reply = await send(ours.otherCoach.person, key, ours.slug, callOf(key))
    // They may know that a colleague's session is there, not what is in its register.
    expect([403, 404]).toContain(reply.status)
  })

  const ofOwnRows = closed.filter((key) => isOwn(key))
  it.each(ofOwnRows)("%s: another golfer's, even for the owner", async (key) => {
    for (const person of [ours.waiting.person, ours.owner.person]) {
      const reply = await send(person, key, ours.slug, callOf(key))
      expect(reply.status).toBe(404)
    }
  })

  it('has changed no row of any table', async () => {
    expect(await fingerprint(world.database)).toEqual(before)
  })
})

describe('what is granted', () => {
  it.each(guarded)('%s: every role that it is granted to', async (key) => {
    for (const role of ROLES.filter((each) => grants(key, each))) {
      const call = await sampleOf(key, ours)
      const reply = await send(personIn(ours, role), key, ours.slug, call)
      expect({ role, text: reply.status < 400 ? '' : reply.text }).toEqual({ role, text: '' })
    }
  })

  it.each(TENANT_ROUTES.filter((key) => isOwn(key)))('%s: the golfer whose it is', async (key) => {
    const reply = await send(ours.golfer.person, key, ours.slug, await sampleOf(key, ours))
    expect(reply.status < 400 ? '' : reply.text).toBe('')
  })

  it.each(TENANT_ROUTES.filter(isPublic))('%s: anybody', async (key) => {
    const reply = await send(world.person(), key, ours.slug, await sampleOf(key, ours))
    expect(reply.status).toBe(200)
  })

  it("shows somebody from another academy none of ours under their 'mine'", async () => {
    const params = { academy: ours.slug }
    const { person } = theirs.golfer
    expect(await person.must('golfers.mine', { params })).toEqual({ golfers: [] })
    expect(await person.must('enrolments.mine', { params })).toEqual({
      enrolments: [],
      waitlist: [],
      creditMinor: 0,
    })
  })
})
