import type { RequestHandler } from 'express'

/**
 * What keeps a stand-in harmless: it is reachable from this machine only, calls nobody but this
 * machine, and takes no key that opens anything real.
 */

/** What a stand-in does not do, however it is configured. */
export class UnsafeError extends Error {}

/** This machine's names for itself: localhost, 127.0.0.0/8 and ::1, with or without brackets. */
export function isLoopback(host: string): boolean {
  return host === 'localhost' || /^127(\.\d{1,3}){3}$/.test(host) || /^\[?::1\]?$/.test(host)
}

/** @throws UnsafeError for an address that another machine, or no machine, answers to. */
export function requireLoopback(url: string, what: string): void {
  if (!URL.canParse(url) || !isLoopback(new URL(url).hostname)) {
    throw new UnsafeError(`The stand-in refuses ${what} off this machine.`)
  }
}

/** Refuses requests under another name, which a page of another site could have led here. */
export const refuseOtherNames: RequestHandler = (request, response, next) => {
  const host = (request.get('host') ?? '').replace(/:\d*$/, '')
  if (isLoopback(host)) return next()
  response.status(421).type('text').send('A stand-in answers to names of this machine only.')
}

/** How the vendors write the keys that move real money, mail or identities. */
const LIVE_KEYS: readonly RegExp[] = [
  /^(sk|rk|pk)_live_/,
  /^SG\.[\w-]{22}\.[\w-]{43}$/,
  /\.apps\.googleusercontent\.com$/,
  /^GOCSPX-/,
]

/** @throws UnsafeError for a key as vendors give them out for real use; it is not repeated. */
export function requireNoLiveKey(key: string, what: string): void {
  if (LIVE_KEYS.some((shape) => shape.test(key))) {
    throw new UnsafeError(`The stand-in refuses a live ${what}.`)
  }
}
