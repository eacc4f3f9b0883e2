import { randomUUID } from 'node:crypto'
import { performance } from 'node:perf_hooks'
import type { RequestHandler } from 'express'
import type { Services } from '../services'

/** Gives each request an id, and logs and measures its answer. */
export function observeRequests({
  log,
  metrics,
}: Pick<Services, 'log' | 'metrics'>): RequestHandler {
  return (request, response, next) => {
    const requestId = randomUUID()
    const began = performance.now()
    response.locals['requestId'] = requestId
    response.setHeader('X-Request-Id', requestId)
    response.on('finish', () => {
      const ms = performance.now() - began
      const route = String(response.locals['route'] ?? 'other')
      const status = response.statusCode
      metrics.requests.observe({ route, status: String(status) }, ms / 1000)
      const line = {
        requestId,
        method: request.method,
        route,
        status,
        ms: Math.round(ms),
        code: response.locals['code'] as unknown,
      }
      log.info(line, 'answered')
    })
    next()
  }
}
