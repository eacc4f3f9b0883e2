import { randomBytes } from 'node:crypto'
import type { RequestHandler, Response } from 'express'
import helmet from 'helmet'
import type { Config } from '../config'

/**
 * An explicit policy: scripts and styles are our own files or carry this answer's nonce. Upgrading
 * and HSTS are promised only where the site is served under TLS.
 */
export function securityHeaders(config: Config): RequestHandler[] {
  const isSecure = config.publicUrl.startsWith('https://')
  const nonce = (_request: unknown, response: object): string =>
    // Helmet knows the plain response only; the line before this one made Express's locals.
    `'nonce-${String((response as Response).locals['nonce'])}'`
  return [
    (_request, response, next) => {
      response.locals['nonce'] = randomBytes(16).toString('base64')
      next()
    },
    helmet({
      contentSecurityPolicy: {
        useDefaults: false,
        directives: {
          defaultSrc: ["'none'"],
          scriptSrc: ["'self'", nonce],
          styleSrc: ["'self'", nonce],
          // react-aria positions its overlays with style attributes set by script.
          styleSrcAttr: ["'unsafe-inline'"],
          imgSrc: ["'self'", 'data:'],
          fontSrc: ["'self'"],
          connectSrc: ["'self'"],
          manifestSrc: ["'self'"],
          formAction: ["'self'"],
          baseUri: ["'none'"],
          frameAncestors: ["'none'"],
          ...(isSecure ? { upgradeInsecureRequests: [] } : {}),
        },
      },
      strictTransportSecurity: isSecure,
      crossOriginResourcePolicy: { policy: 'same-origin' },
    }),
  ]
}
