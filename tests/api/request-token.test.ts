import { ROUTES, pathOf, type RouteKey, type RouteSpec } from '@marram/contract'
import { beforeAll, describe, expect, it } from 'vitest'
import { PASSWORD, openAcademy, signUp, type OpenAcademy, type SignedUp } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()
let academy: OpenAcademy
let owner: SignedUp

beforeAll(async () => {
  academy = await openAcademy(world)
  owner = academy.owner
})

const add = (headers: Record<string, string>) =>
  owner.person.call('venues.add', {
    params: { academy: academy.slug },
    body: { name: 'Forged', latitudeDeg: 53, longitudeDeg: -6 },
    headers,
  })
const venueNames = async () => {
  const { venues } = await owner.person.must('venues.list', { params: { academy: academy.slug } })
  return venues.map(({ name }) => name)
}

describe('a change', () => {
  it.each([
    ['another site', { origin: 'https://somewhere.example' }],
    ['a page without an address', { origin: 'null' }],
    ['our address on another port', { origin: 'http://127.0.0.1:1' }],
    ['our name as a part of another', { origin: `${world.url}.somewhere.example` }],
    ['a page with no token', { 'x-marram-token': '' }],
    ['a page with a made-up token', { 'x-marram-token': 'abcdefghijklmnopqrstuvwx.abcdef' }],
  ])('from %s is refused, and nothing is changed', async (_, headers) => {
    const reply = await add(headers)
    expect(reply.status).toBe(403)
    expect(reply.problem?.code).toBe('foreign-origin')
    expect(await venueNames()).not.toContain('Forged')
  })

  it("with another person's token is refused", async () => {
    const other = await signUp(world)
    const { token } = await other.person.must('session.read')
    expect((await add({ 'x-marram-token': token })).status).toBe(403)
    // Even when the other's cookie was planted beside it: the token is bound to the sign-in.
    const cookie = `marram=${owner.person.cookie('marram') ?? ''}; marram-token=${token}`
    expect((await add({ 'x-marram-token': token, cookie })).status).toBe(403)
    expect(await venueNames()).not.toContain('Forged')
  })

  it("with another visitor's token is refused, so that nobody is signed in unawares", async () => {
    const { token } = await world.person().must('session.read')
    const { email } = owner.account
    const reply = await world.person().call('session.sign-in', {
      body: { email, password: PASSWORD },
      headers: { 'x-marram-token': token },
    })
    expect(reply.problem?.code).toBe('foreign-origin')
  })

  it('with a token of before the sign-in is refused', async () => {
    const person = world.person()
    const { token } = await person.must('session.read')
    const { email } = owner.account
    await person.must('session.sign-in', { body: { email, password: PASSWORD } })
    const headers = { 'x-marram-token': token }
    expect((await person.call('session.sign-out', { headers })).status).toBe(403)
  })

  it('with the token of a sign-in that ended elsewhere is asked to sign in', async () => {
    const { person } = await signUp(world)
    const { token } = await person.must('session.read')
    const phone = world.person()
    phone.putCookie('marram', person.cookie('marram') ?? '')
    await phone.must('session.sign-out')
    const headers = { 'x-marram-token': token }
    const reply = await person.call('accounts.send-verification', { headers })
    expect(reply.problem?.code).toBe('not-signed-in')
  })

  it('of a visitor with an old token and no sign-in is told to load the page again', async () => {
    const visitor = world.person()
    const body = { email: 'nobody@mail.example', password: PASSWORD }
    const headers = { 'x-marram-token': 'abcdefghijklmnopqrstuvwx.abcdef' }
    const reply = await visitor.call('session.sign-in', { body, headers })
    expect(reply.problem?.code).toBe('foreign-origin')
  })

  it('from our own page goes through', async () => {
    expect((await add({})).status).toBe(200)
    expect(await venueNames()).toContain('Forged')
  })
})

describe('every route that changes something', () => {
  const changing = (Object.keys(ROUTES) as RouteKey[]).filter((key) => {
    const { method }: RouteSpec = ROUTES[key]
    return method !== 'GET'
  })
  const anyId = '01900000-0000-7000-8000-000000000001'
  const paramsOf = (key: RouteKey) =>
    Object.fromEntries(
      [...ROUTES[key].path.matchAll(/:(\w+)/g)].map(([, name = '']) => [
        name,
        name === 'academy' ? academy.slug : anyId,
      ]),
    )

  it.each(changing)('%s is refused from another site before anything else', async (key) => {
    const path = pathOf(key, paramsOf(key))
    const origin = 'https://somewhere.example'
    const reply = await owner.person.send(ROUTES[key].method, path, {}, { origin })
    expect(reply.problem?.code).toBe('foreign-origin')
  })
})
