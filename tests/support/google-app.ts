import { createServer } from 'node:http'
import type { OauthFake } from '@marram/fakes'
import express, { type RequestHandler } from 'express'
import session from 'express-session'
import passport from 'passport'
import { Strategy as GoogleStrategy, type Profile } from 'passport-google-oauth20'

export const CLIENT = { clientId: 'marram', clientSecret: 'marram-secret' }

export interface GoogleApp {
  url: string
  callbackUrl: string
  close: () => Promise<void>
}

/**
 * A tiny app that signs people in as the product does: the vendor's strategy, its addresses turned
 * to the stand-in, and the state kept in a session. It answers with what became of the sign-in.
 */
export async function startGoogleApp(
  fake: OauthFake,
  { scope = ['openid', 'email', 'profile'], clientSecret = CLIENT.clientSecret } = {},
): Promise<GoogleApp> {
  const app = express()
  const server = createServer(app)
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const address = server.address()
  if (address === null || typeof address === 'string') throw new Error('no address to listen on')
  const url = `http://127.0.0.1:${address.port}`
  const authenticator = new passport.Passport()
  authenticator.use(
    new GoogleStrategy(
      {
        clientID: CLIENT.clientId,
        clientSecret,
        callbackURL: `${url}/callback`,
        state: true,
        authorizationURL: `${fake.url}/authorize`,
        tokenURL: `${fake.url}/token`,
        userProfileURL: `${fake.url}/userinfo`,
      },
      (_accessToken, _refreshToken, profile, done) => done(null, profile),
    ),
  )
  app.use(session({ secret: 'a secret for tests', resave: false, saveUninitialized: false }))
  const go = authenticator.authenticate('google', { session: false, scope }) as RequestHandler
  app.get('/sign-in', go)
  app.get('/callback', (request, response, next) => {
    const done = (error: unknown, profile?: Profile | false) => {
      if (error instanceof Error) {
        return void response.status(502).json({ error: `${error.name}: ${error.message}` })
      }
      if (!profile) return void response.status(401).json({ error: 'refused' })
      const { id, displayName, name, emails } = profile
      response.json({ id, displayName, name, emails })
    }
    const back = authenticator.authenticate('google', { session: false }, done) as RequestHandler
    void back(request, response, next)
  })
  return {
    url,
    callbackUrl: `${url}/callback`,
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve())
        server.closeAllConnections()
      }),
  }
}
