import { createHmac, randomBytes, timingSafeEqual } from 'node:crypto'
import type { Request, RequestHandler, Response } from 'express'
import { Problem } from '../errors'
import type { Services } from '../services'
import { cookieName } from './sign-in-session'

const SAFE_METHODS = new Set(['GET', 'HEAD', 'OPTIONS'])
const HEADER = 'x-marram-token'
const COOKIE = 'marram-token'

/**
 * Refuses a change that did not come from our own pages: the Origin must be ours, and the header
 * must repeat the cookie's token, which only our pages can read and which is bound to the sign-in.
 */
export function checkOriginAndToken(services: Services): RequestHandler {
  return (request, _response, next) => {
    if (SAFE_METHODS.has(request.method)) return next()
    const origin = request.get('origin')
    if (origin !== undefined && origin !== services.config.publicUrl) {
      throw new Problem('foreign-origin', 'This came from a page that is not ours.')
    }
    const sent = request.get(HEADER) ?? ''
    if (!isValid(services, request, sent) || sent !== cookieOf(request, COOKIE)) {
      if (isSignInGone(services, request)) {
        throw new Problem('not-signed-in', 'Your sign-in has ended. Please sign in again.')
      }
      throw new Problem(
        'foreign-origin',
        'This page is out of date. Load it again and try once more.',
      )
    }
    next()
  }
}

/** The token of this visitor, made when there is none or when it belongs to an earlier sign-in. */
export function tokenOf(services: Services, request: Request, response: Response): string {
  const had = cookieOf(request, COOKIE)
  if (had && isValid(services, request, had)) return had
  const nonce = randomBytes(18).toString('base64url')
  const token = `${nonce}.${sign(services, request, nonce)}`
  response.cookie(COOKIE, token, {
    sameSite: 'strict',
    secure: services.config.publicUrl.startsWith('https://'),
    path: '/',
  })
  return token
}

function isValid(services: Services, request: Request, token: string): boolean {
  const [nonce, signature] = token.split('.')
  if (!nonce || !signature) return false
  const right = Buffer.from(sign(services, request, nonce))
  const given = Buffer.from(signature)
  return right.length === given.length && timingSafeEqual(right, given)
}

function sign(services: Services, request: Request, nonce: string): string {
  const boundTo = request.session.accountId ? request.sessionID : 'visitor'
  return createHmac('sha256', services.config.secret)
    .update(`${boundTo}:${nonce}`)
    .digest('base64url')
}

/**
 * Whether the browser still carries a sign-in that has ended: the session middleware found nothing
 * under its id and began anew. Its token is then as old as the sign-in, and no page is to blame.
 */
function isSignInGone(services: Services, request: Request): boolean {
  const carried = cookieOf(request, cookieName(services.config))
  return carried !== undefined && !carried.includes(request.sessionID)
}

function cookieOf(request: Request, name: string): string | undefined {
  const header = request.get('cookie') ?? ''
  return header
    .split(/;\s*/)
    .find((pair) => pair.startsWith(`${name}=`))
    ?.slice(name.length + 1)
}
