import { randomBytes } from 'node:crypto'
import express, { urlencoded } from 'express'
import { closeServer, listenOnLoopback } from '../listen'
import { escapeHtml, page } from '../page'

export interface FakePerson {
  sub: string
  name: string
  email: string
  isVerified: boolean
}

export interface OauthFakeOptions {
  port?: number
  clientId: string
  clientSecret: string
  people?: FakePerson[]
  now?: () => Date
}

export interface OauthFake {
  url: string
  port: number
  close(): Promise<void>
}

const CODE_SECONDS = 600

const PEOPLE: FakePerson[] = [
  { sub: '100001', name: 'Greta Maslow', email: 'greta.maslow@mail.example', isVerified: true },
  { sub: '100002', name: 'Hugo Vandeleur', email: 'hugo.vandeleur@mail.example', isVerified: true },
  { sub: '100003', name: 'Vera Quirke', email: 'vera.quirke@mail.example', isVerified: false },
]

/** Starts an identity provider's stand-in on loopback: a page to pick who signs in. */
export async function startOauthFake(options: OauthFakeOptions): Promise<OauthFake> {
  const now = options.now ?? (() => new Date())
  const people = [...(options.people ?? PEOPLE)]
  const codes = new Map<string, { sub: string; redirectUri: string; expires: number }>()
  const tokens = new Map<string, string>()
  const app = express()
  app.disable('x-powered-by')
  app.use(urlencoded({ extended: false }))

  app.get('/authorize', (request, response) => {
    const asked = request.query as Record<string, string>
    if (asked['client_id'] !== options.clientId || asked['response_type'] !== 'code') {
      return void response.status(400).send(page('Sign in', '<h1>This app is not known here</h1>'))
    }
    response.send(pickPage(people, asked))
  })
  app.post('/authorize', (request, response) => {
    const body = request.body as Record<string, string>
    const redirect = new URL(body['redirect_uri'] ?? '')
    if (body['state']) redirect.searchParams.set('state', body['state'])
    if (body['sub'] === 'nobody') redirect.searchParams.set('error', 'access_denied')
    else {
      const sub = body['sub'] || newPerson(people, body['email'] ?? '')
      const code = randomBytes(16).toString('hex')
      const expires = now().getTime() / 1000 + CODE_SECONDS
      codes.set(code, { sub, redirectUri: body['redirect_uri'] ?? '', expires })
      redirect.searchParams.set('code', code)
    }
    response.redirect(303, redirect.toString())
  })
  app.post('/token', (request, response) => {
    const body = request.body as Record<string, string>
    const refuse = (error: string) => response.status(400).json({ error })
    if (body['client_id'] !== options.clientId || body['client_secret'] !== options.clientSecret) {
      return void response.status(401).json({ error: 'invalid_client' })
    }
    if (body['grant_type'] !== 'authorization_code') return void refuse('unsupported_grant_type')
    const code = codes.get(body['code'] ?? '')
    // A code works once, whatever comes of it.
    codes.delete(body['code'] ?? '')
    const isGood =
      code && code.redirectUri === body['redirect_uri'] && code.expires >= now().getTime() / 1000
    if (!isGood) return void refuse('invalid_grant')
    const token = randomBytes(16).toString('hex')
    tokens.set(token, code.sub)
    response.json({
      access_token: token,
      token_type: 'Bearer',
      expires_in: 3600,
      scope: 'openid email profile',
    })
  })
  app.get('/userinfo', (request, response) => {
    const given =
      request.get('authorization')?.replace(/^Bearer /, '') ??
      String(request.query['access_token'] ?? '')
    const person = people.find(({ sub }) => sub === tokens.get(given))
    if (!person) return void response.status(401).json({ error: 'invalid_token' })
    const { sub, name, email, isVerified } = person
    const [given_name, ...rest] = name.split(' ')
    response.json({
      sub,
      name,
      given_name,
      family_name: rest.join(' '),
      email,
      email_verified: isVerified,
    })
  })

  const listening = await listenOnLoopback(app, options)
  return {
    url: listening.url,
    port: listening.port,
    close: () => closeServer(listening.server),
  }
}

/** Somebody typed in by address; the same address is the same person next time. */
function newPerson(people: FakePerson[], email: string): string {
  const had = people.find((person) => person.email === email)
  if (had) return had.sub
  const sub = String(200_000 + people.length)
  people.push({ sub, name: email.split('@')[0] ?? email, email, isVerified: true })
  return sub
}

function pickPage(people: readonly FakePerson[], asked: Record<string, string>): string {
  const hidden = ['redirect_uri', 'state']
    .map((name) => `<input type="hidden" name="${name}" value="${escapeHtml(asked[name] ?? '')}">`)
    .join('')
  const buttons = people
    .map(
      ({ sub, name, email, isVerified }) =>
        `<p><button name="sub" value="${sub}">${escapeHtml(name)}, ${escapeHtml(email)}${isVerified ? '' : ' (not confirmed)'}</button></p>`,
    )
    .join('')
  return page(
    'Who are you?',
    `<h1>Who are you?</h1><p class="note">The local stand-in of an identity provider. All people are invented.</p>
     <form method="post" action="/authorize">${hidden}${buttons}<p><button name="sub" value="nobody">Cancel</button></p></form>
     <form method="post" action="/authorize">${hidden}<label for="email">Somebody else</label>
     <input id="email" name="email" type="email" required><p><button>Sign in</button></p></form>`,
  )
}
