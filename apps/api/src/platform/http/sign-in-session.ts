import { randomBytes } from 'node:crypto'
import type { Request, RequestHandler, Response } from 'express'
import session from 'express-session'
import type { Services } from '../services'
import { invariant } from '../invariant'
import { SignInStore } from './sign-in-store'

const THIRTY_DAYS_MS = 30 * 24 * 60 * 60 * 1000

/** `__Host-` needs Secure, which needs TLS; plain http is served on loopback only. */
export function cookieName(config: Services['config']): string {
  return isSecure(config) ? '__Host-marram' : 'marram'
}

const isSecure = (config: Services['config']): boolean => config.publicUrl.startsWith('https://')

/** The middleware that carries a sign-in from request to request. */
export function signInSessions(services: Services): RequestHandler {
  return session({
    name: cookieName(services.config),
    secret: services.config.secret,
    store: new SignInStore(services),
    resave: false,
    saveUninitialized: false,
    genid: () => randomBytes(32).toString('base64url'),
    cookie: {
      httpOnly: true,
      sameSite: 'lax',
      secure: isSecure(services.config),
      path: '/',
      maxAge: THIRTY_DAYS_MS,
    },
  })
}

/** Signs the person in under a new session id, so that one known before is worth nothing. */
export async function signInAs(
  { db }: Services,
  request: Request,
  accountId: string,
): Promise<void> {
  const row = await db('accounts')
    .where({ id: accountId })
    .first<{ sessionVersion: number } | undefined>('sessionVersion')
  invariant(row, 'the account that signs in exists')
  await new Promise<void>((resolve, reject) => {
    request.session.regenerate((error?: unknown) => (error ? reject(error) : resolve()))
  })
  request.session.accountId = accountId
  request.session.sessionVersion = row.sessionVersion
  await new Promise<void>((resolve, reject) => {
    request.session.save((error?: unknown) => (error ? reject(error) : resolve()))
  })
}

export async function signOut(request: Request, response: Response): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    request.session.destroy((error?: unknown) => (error ? reject(error) : resolve()))
  })
  response.clearCookie(cookieName(request.app.locals['config'] as Services['config']), {
    path: '/',
  })
}
