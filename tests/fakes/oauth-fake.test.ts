import { startOauthFake, type OauthFake } from '@marram/fakes'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { CLIENT, startGoogleApp, type GoogleApp } from '../support/google-app'
import { movableClock } from '../support/payments'

const clock = movableClock('2027-04-06T10:00:00Z')

let fake: OauthFake
let app: GoogleApp

beforeEach(async () => {
  fake = await startOauthFake({ ...CLIENT, now: clock.now })
  app = await startGoogleApp(fake)
})
afterEach(async () => {
  await app.close()
  await fake.close()
})

/** Goes from the app to the stand-in's page, as a browser does. */
const begin = async (from = app) => {
  const start = await fetch(`${from.url}/sign-in`, { redirect: 'manual' })
  const cookie = start.headers.get('set-cookie')?.split(';')[0] ?? ''
  const address = new URL(start.headers.get('location') ?? '')
  const html = await (await fetch(address)).text()
  return { cookie, address, html }
}
/** Answers the page by its form, and gives the address it leads back to. */
const choose = async (html: string, choice: Record<string, string>) => {
  const hidden = [...html.matchAll(/type="hidden" name="(\w+)" value="([^"]*)"/g)]
  const fields = hidden.map(([, name, value]) => [name!, value!.replaceAll('&amp;', '&')] as const)
  const body = new URLSearchParams({ ...Object.fromEntries(fields), ...choice })
  const answer = await fetch(`${fake.url}/authorize`, { method: 'POST', body, redirect: 'manual' })
  return { status: answer.status, back: answer.headers.get('location') ?? '' }
}
const comeBack = async (back: string, cookie: string) => {
  const response = await fetch(back, { headers: { cookie } })
  const body: unknown = await response.json()
  return { status: response.status, body }
}
const signIn = async (choice: Record<string, string>, from = app) => {
  const { cookie, html } = await begin(from)
  const { back } = await choose(html, choice)
  return comeBack(back, cookie)
}
const exchange = (code: string, changes: Record<string, string> = {}) =>
  fetch(`${fake.url}/token`, {
    method: 'POST',
    body: new URLSearchParams({
      grant_type: 'authorization_code',
      client_id: CLIENT.clientId,
      client_secret: CLIENT.clientSecret,
      redirect_uri: app.callbackUrl,
      code,
      ...changes,
    }),
  })
const codeOf = async () => {
  const { back } = await choose((await begin()).html, { sub: '100001' })
  return new URL(back).searchParams.get('code') ?? ''
}

describe('the identity provider’s stand-in', () => {
  it('asks who signs in, and tells the app who it was', async () => {
    const { address, html } = await begin()
    expect(address.searchParams.get('client_id')).toBe('marram')
    for (const name of ['Greta Maslow', 'Hugo Vandeleur', 'Vera Quirke']) {
      expect(html).toContain(name)
    }
    expect(await signIn({ sub: '100001' })).toEqual({
      status: 200,
      body: {
        id: '100001',
        displayName: 'Greta Maslow',
        name: { givenName: 'Greta', familyName: 'Maslow' },
        emails: [{ value: 'greta.maslow@mail.example', verified: true }],
      },
    })
  })

  it('knows a person whose address is not confirmed, and says so', async () => {
    const { body } = await signIn({ sub: '100003' })
    expect(body).toMatchObject({ emails: [{ value: 'vera.quirke@mail.example', verified: false }] })
    expect((await begin()).html).toContain('vera.quirke@mail.example (not confirmed)')
  })

  it('lets somebody else type an address, and knows them again by it', async () => {
    const first = await signIn({ email: 'new.golfer@mail.example' })
    expect(first.body).toMatchObject({ emails: [{ value: 'new.golfer@mail.example' }] })
    expect(await signIn({ email: 'New.Golfer@mail.example' })).toEqual(first)
    expect((await signIn({ email: 'another@mail.example' })).body).not.toEqual(first.body)
  })

  it('lets a person turn back', async () => {
    const { cookie, html } = await begin()
    const { back } = await choose(html, { sub: 'nobody' })
    expect(new URL(back).searchParams.get('error')).toBe('access_denied')
    expect(await comeBack(back, cookie)).toEqual({ status: 401, body: { error: 'refused' } })
  })

  it('carries the state, without which the app lets nobody in', async () => {
    const { cookie, address, html } = await begin()
    const { back } = await choose(html, { sub: '100001' })
    const state = address.searchParams.get('state')
    expect(state).toBeTruthy()
    expect(new URL(back).searchParams.get('state')).toBe(state)
    const forged = new URL(back)
    forged.searchParams.set('state', 'another')
    expect((await comeBack(forged.toString(), cookie)).status).toBe(401)
  })

  it('tells only what the app has asked to know', async () => {
    const shy = await startGoogleApp(fake, { scope: ['openid', 'email'] })
    const { body } = await signIn({ sub: '100002' }, shy)
    await shy.close()
    expect(body).toEqual({
      id: '100002',
      emails: [{ value: 'hugo.vandeleur@mail.example', verified: true }],
    })
  })
})

describe('a code', () => {
  it('is exchanged once', async () => {
    const code = await codeOf()
    const first = await exchange(code)
    expect(first.status).toBe(200)
    expect(await first.json()).toMatchObject({
      token_type: 'Bearer',
      expires_in: 3600,
      scope: 'openid email profile',
    })
    const second = await exchange(code)
    expect(second.status).toBe(400)
    expect(await second.json()).toMatchObject({ error: 'invalid_grant' })
  })

  it('is good for ten minutes, and its token for an hour', async () => {
    const [early, late] = [await codeOf(), await codeOf()]
    clock.moveBy(599)
    const answer = await exchange(early)
    const { access_token } = (await answer.json()) as { access_token: string }
    clock.moveBy(1)
    expect((await exchange(late)).status).toBe(400)
    const profile = () => fetch(`${fake.url}/userinfo?access_token=${access_token}`)
    clock.moveBy(3_598)
    expect((await profile()).status).toBe(200)
    clock.moveBy(1)
    expect((await profile()).status).toBe(401)
  })

  it('is of no use with another secret, client, way back or kind of grant', async () => {
    const wrongApp = await startGoogleApp(fake, { clientSecret: 'wrong' })
    const refused = await signIn({ sub: '100001' }, wrongApp)
    await wrongApp.close()
    expect(refused.status).toBe(502)
    expect(refused.body).toEqual({ error: 'TokenError: Unauthorized' })
    const wrong: [number, Record<string, string>][] = [
      [401, { client_secret: 'wrong' }],
      [401, { client_id: 'wrong' }],
      [400, { redirect_uri: 'http://127.0.0.1:9/elsewhere' }],
      [400, { grant_type: 'password' }],
    ]
    for (const [status, changes] of wrong) {
      expect((await exchange(await codeOf(), changes)).status).toBe(status)
    }
  })
})

describe('the page', () => {
  it.each([
    ['an app it does not know', { client_id: 'stranger' }],
    ['an app that wants tokens at once', { response_type: 'token' }],
    ['an app that does not say what it wants', { scope: '' }],
    ['a way back that leads elsewhere', { redirect_uri: 'https://example.org/callback' }],
    ['no way back', { redirect_uri: '' }],
  ])('is not for %s', async (_what, changes) => {
    const { address } = await begin()
    for (const [name, value] of Object.entries(changes)) address.searchParams.set(name, value)
    const response = await fetch(address)
    expect(response.status).toBe(400)
    expect(await response.text()).not.toContain('Greta')
  })

  it('takes no answer for a person it does not know, or back to elsewhere', async () => {
    const { html } = await begin()
    expect((await choose(html, { sub: '999' })).status).toBe(400)
    expect((await choose(html, {})).status).toBe(400)
    const elsewhere = { sub: '100001', redirect_uri: 'https://example.org/callback' }
    expect((await choose(html, elsewhere)).status).toBe(400)
  })

  it('hands on what it was given as text, not as markup', async () => {
    const { address } = await begin()
    address.searchParams.set('state', '"><script>alert(1)</script>')
    expect(await (await fetch(address)).text()).not.toContain('<script>')
  })
})
