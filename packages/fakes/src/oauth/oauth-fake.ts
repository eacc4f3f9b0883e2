import { urlencoded, type Express, type Request, type Response } from 'express'
import { closeServer, listenOnLoopback, makeApp } from '../listen'
import { isLoopback, requireNoLiveKey } from '../safety'
import { TOKEN_SECONDS, makeGrants, type Grants } from './grants'
import { PEOPLE, personByEmail, type FakePerson } from './people'
import { pickPage, refusalPage } from './pick-page'

export interface OauthFakeOptions {
  host?: string
  port?: number
  clientId: string
  clientSecret: string
  people?: readonly FakePerson[]
  now?: () => Date
}

export interface OauthFake {
  url: string
  port: number
  close: () => Promise<void>
}

interface Provider {
  clientId: string
  clientSecret: string
  people: FakePerson[]
  grants: Grants
}

/** Starts an identity provider's stand-in on loopback: a page to pick who signs in. */
export async function startOauthFake(options: OauthFakeOptions): Promise<OauthFake> {
  const { clientId, clientSecret } = options
  requireNoLiveKey(clientId, 'client')
  requireNoLiveKey(clientSecret, 'client secret')
  const people = [...(options.people ?? PEOPLE)]
  const grants = makeGrants(options.now ?? (() => new Date()))
  const app = makeApp()
  const provider: Provider = { clientId, clientSecret, people, grants }
  authorizeRoutes(app, provider)
  tokenRoutes(app, provider)
  const listening = await listenOnLoopback(app, options)
  return {
    url: listening.url,
    port: listening.port,
    close: () => closeServer(listening.server),
  }
}

/** The page, and what a person answers on it. */
function authorizeRoutes(app: Express, { clientId, people, grants }: Provider): void {
  const refuse = (response: Response, sentence: string) =>
    void response.status(400).send(refusalPage(sentence))
  const isOurs = (uri: string) => URL.canParse(uri) && isLoopback(new URL(uri).hostname)

  app.get('/authorize', (request, response) => {
    const asked = textsOf(request.query)
    const { redirect_uri: redirectUri = '', state = '', scope = '' } = asked
    if (asked['client_id'] !== clientId) return refuse(response, 'This app is not known here.')
    if (asked['response_type'] !== 'code') return refuse(response, 'Only codes are given here.')
    if (scope === '') return refuse(response, 'The app does not say what it wants to know.')
    if (!isOurs(redirectUri)) return refuse(response, 'The way back leads off this machine.')
    response.send(pickPage(people, { redirectUri, state, scope }))
  })
  app.post('/authorize', urlencoded({ extended: false }), (request, response) => {
    const { redirect_uri: redirectUri = '', state, scope = '', sub, email } = textsOf(request.body)
    if (!isOurs(redirectUri)) return refuse(response, 'The way back leads off this machine.')
    const back = new URL(redirectUri)
    if (state) back.searchParams.set('state', state)
    if (sub === 'nobody') {
      back.searchParams.set('error', 'access_denied')
      return response.redirect(303, back.toString())
    }
    const person = email ? personByEmail(people, email) : people.find((one) => one.sub === sub)
    if (!person) return refuse(response, 'There is no such person.')
    back.searchParams.set('code', grants.makeCode({ sub: person.sub, scope, redirectUri }))
    response.redirect(303, back.toString())
  })
}

/** What the app asks for behind the person's back: a token, and who they are. */
function tokenRoutes(app: Express, provider: Provider): void {
  const { clientId, clientSecret, people, grants } = provider
  const refuse = (response: Response, status: number, error: string, description: string) =>
    void response.status(status).json({ error, error_description: description })

  app.post('/token', urlencoded({ extended: false }), (request, response) => {
    const body = textsOf(request.body)
    if (body['client_id'] !== clientId || body['client_secret'] !== clientSecret) {
      return refuse(response, 401, 'invalid_client', 'Unauthorized')
    }
    if (body['grant_type'] !== 'authorization_code') {
      return refuse(response, 400, 'unsupported_grant_type', 'Only codes are exchanged here.')
    }
    const granted = grants.exchange(body['code'] ?? '', body['redirect_uri'] ?? '')
    if (!granted) return refuse(response, 400, 'invalid_grant', 'Bad Request')
    const { token: access_token, scope } = granted
    response.json({ access_token, token_type: 'Bearer', expires_in: TOKEN_SECONDS, scope })
  })
  app.get('/userinfo', (request, response) => {
    const granted = grants.read(tokenOf(request))
    const person = people.find(({ sub }) => sub === granted?.sub)
    if (!granted || !person) return refuse(response, 401, 'invalid_request', 'Invalid Credentials')
    response.json(claimsOf(person, granted.scope.split(' ')))
  })
}

/** What a token may read of a person, as its scopes say. */
function claimsOf({ sub, name, email, isVerified }: FakePerson, scopes: readonly string[]) {
  const [given_name, ...rest] = name.split(' ')
  return {
    sub,
    ...(scopes.includes('profile') ? { name, given_name, family_name: rest.join(' ') } : {}),
    ...(scopes.includes('email') ? { email, email_verified: isVerified } : {}),
  }
}

const tokenOf = (request: Request): string =>
  request.get('authorization')?.replace(/^Bearer /, '') ??
  textsOf(request.query)['access_token'] ??
  ''

/** The fields that are texts; a name given twice is none. */
function textsOf(fields: unknown): Partial<Record<string, string>> {
  const entries: [string, unknown][] = Object.entries(Object(fields) as object)
  return Object.fromEntries(
    entries.filter((entry): entry is [string, string] => typeof entry[1] === 'string'),
  )
}
