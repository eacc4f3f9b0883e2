import type { Request, RequestHandler } from 'express'
import { Router } from 'express'
import passport from 'passport'
import { Strategy as GoogleStrategy, type Profile } from 'passport-google-oauth20'
import { Strategy as LocalStrategy } from 'passport-local'
import { Problem } from '../platform/errors'
import { signInAs } from '../platform/http/sign-in-session'
import type { Services } from '../platform/services'
import { signIn, signInWithProvider } from './accounts'
import { checkedReturnPath } from './rules'

const GOOGLE_ISSUER = 'https://accounts.google.com'

/** Both ways to sign in, on a passport of this app's own. */
export function makePassport(services: Services): passport.Authenticator {
  const authenticator = new passport.Passport()
  authenticator.use(
    new LocalStrategy({ usernameField: 'email' }, (email, password, done) => {
      signIn(services, { email: email.trim().toLowerCase(), password }).then(
        (accountId) => done(null, { accountId }),
        (error: unknown) => done(error),
      )
    }),
  )
  const { clientId, clientSecret, url } = services.config.google
  authenticator.use(
    new GoogleStrategy(
      {
        clientID: clientId,
        clientSecret,
        callbackURL: `${services.config.publicUrl}/auth/google/callback`,
        state: true,
        ...(url
          ? {
              authorizationURL: `${url}/authorize`,
              tokenURL: `${url}/token`,
              userProfileURL: `${url}/userinfo`,
            }
          : {}),
      },
      (_accessToken, _refreshToken, profile, done) => {
        signInWithProvider(services, toProfile(profile)).then(
          (accountId) => done(null, { accountId }),
          (error: unknown) => done(error as Error),
        )
      },
    ),
  )
  return authenticator
}

function toProfile(profile: Profile) {
  const [first] = profile.emails ?? []
  return {
    issuer: GOOGLE_ISSUER,
    subject: profile.id,
    email: first?.value ?? null,
    // Some answers carry the claim as text.
    isEmailVerified: String(first?.verified) === 'true',
    name: (profile.displayName || first?.value || 'Golfer').slice(0, 80),
  }
}

/** Runs a strategy without passport's own sessions, and resolves to the account's id. */
export function authenticateLocally(
  authenticator: passport.Authenticator,
  request: Request,
): Promise<string> {
  return new Promise((resolve, reject) => {
    const done = (error: unknown, person?: { accountId: string } | false) => {
      if (error) return reject(error)
      if (!person) {
        return reject(new Problem('wrong-credentials', 'Please give an address and a password.'))
      }
      resolve(person.accountId)
    }
    const middleware = authenticator.authenticate(
      'local',
      { session: false },
      done,
    ) as RequestHandler
    void middleware(request, request.res ?? ({} as never), reject)
  })
}

/** The two addresses that a browser visits on its way to and from the identity provider. */
export function providerRoutes(services: Services, authenticator: passport.Authenticator): Router {
  const router = Router()
  router.get('/auth/google', (request, response, next) => {
    request.session.returnTo = checkedReturnPath(request.query['to'])
    const options = { session: false, scope: ['openid', 'email', 'profile'] }
    const go = authenticator.authenticate('google', options) as RequestHandler
    void go(request, response, next)
  })
  router.get('/auth/google/callback', (request, response, next) => {
    const returnTo = checkedReturnPath(request.session.returnTo)
    const done = (error: unknown, person?: { accountId: string } | false) => {
      if (error && !(error instanceof Problem) && !isOfProvider(error)) return next(error)
      if (error || !person) {
        const reason = error instanceof Problem ? 'unconfirmed' : 'refused'
        return response.redirect(`/sign-in?google=${reason}&to=${encodeURIComponent(returnTo)}`)
      }
      signInAs(services, request, person.accountId).then(() => response.redirect(returnTo), next)
    }
    const back = authenticator.authenticate('google', { session: false }, done) as RequestHandler
    void back(request, response, next)
  })
  return router
}

/** What the strategy throws where the provider would not, or nobody began here. */
const PROVIDER_ERRORS = ['AuthorizationError', 'InternalOAuthError', 'TokenError']

const isOfProvider = (error: unknown): boolean =>
  error instanceof Error && PROVIDER_ERRORS.includes(error.name)
