import { afterEach, describe, expect, it, vi } from 'vitest'
import { call } from './client'

const json = (body: unknown, status = 200) =>
  new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json' } })
const refusal = (code: string, status: number) => json({ code, status, detail: code }, status)

/** Answers in turn; the session is read where no answer was given for it. */
function serve(...answers: Response[]) {
  const sent: string[] = []
  vi.stubGlobal('document', { cookie: 'marram-token=a-token' })
  vi.stubGlobal('fetch', (path: string, { method = 'GET' }: RequestInit = {}) => {
    sent.push(`${method} ${path}`)
    if (method === 'GET') return Promise.resolve(json({ account: null, memberships: [] }))
    return Promise.resolve(answers.shift())
  })
  return sent
}

afterEach(() => vi.unstubAllGlobals())

const signIn = () =>
  call('session.sign-in', { body: { email: 'ada@mail.example', password: 'a password' } })
const ASKED_AGAIN = ['POST /api/session', 'GET /api/session', 'POST /api/session']

describe('a change that is refused', () => {
  it.each([
    ['foreign-origin', 403],
    ['not-signed-in', 401],
  ])('as %s by a public route is sent once more with a token of now', async (code, status) => {
    const sent = serve(refusal(code, status), json({ account: null }))
    await signIn()
    expect(sent).toEqual(ASKED_AGAIN)
  })

  it('as not signed in by another route is not sent again', async () => {
    const sent = serve(refusal('not-signed-in', 401))
    await expect(call('accounts.send-verification', {})).rejects.toMatchObject({
      code: 'not-signed-in',
    })
    expect(sent).toHaveLength(1)
  })

  it('a second time is refused for good', async () => {
    serve(refusal('foreign-origin', 403), refusal('foreign-origin', 403))
    await expect(signIn()).rejects.toMatchObject({ code: 'foreign-origin' })
  })

  it('by something before the API is said in our own words', async () => {
    serve(new Response('<h1>Forbidden</h1>', { status: 403 }))
    await expect(signIn()).rejects.toMatchObject({ code: 'unexpected' })
  })
})
