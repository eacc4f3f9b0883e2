import { randomBytes } from 'node:crypto'
import type { Request, RequestHandler, Response } from 'express'
import session from 'express-session'
import type { Services } from '../services'
import type { SignedInAccount } from './context'
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
  const store = new SignInStore(services)
  return session({
    name: cookieName(services.config),
    secret: services.config.secret,
    store,
    resave: false,
    saveUninitialized: false,
    genid: () => {
      const id = randomBytes(32).toString('base64url')
      store.expectNew(id)
      return id
    },
    cookie: {
      httpOnly: true,
      sameSite: 'lax',
      secure: isSecure(services.config),
      path: '/',
      maxAge: THIRTY_DAYS_MS,
    },
  })
}

interface AccountRow {
  id: string
  name: string
  email: string
  emailVerifiedAt: Date | null
  passwordHash: string | null
  sessionVersion: number
}

/** The person of this request, or null. A session of an older version counts as ended. */
export async function currentAccount(
  { db }: Services,
  request: Request,
): Promise<SignedInAccount | null> {
  const { accountId, sessionVersion } = request.session
  if (!accountId) return null
  const row = await db('accounts').where({ id: accountId }).first<AccountRow | undefined>()
  if (!row || row.sessionVersion !== sessionVersion) return null
  return {
    id: row.id,
    name: row.name,
    email: row.email,
    isVerified: row.emailVerifiedAt !== null,
    hasPassword: row.passwordHash !== null,
  }
}

/** Signs the person in under a new session id, so that one known before is worth nothing. */
export async function signInAs(
  { db }: Services,
  request: Request,
  accountId: string,
): Promise<void> {
  const row = await db('accounts').where({ id: accountId }).first<AccountRow | undefined>()
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
