import { Router, type Request } from 'express'
import type { Services } from '../services'

/** `/healthz`: the process lives. `/readyz`: it can serve. `/metrics`: for Prometheus, loopback only. */
export function healthRoutes({ db, metrics }: Services, isStopping: () => boolean): Router {
  const router = Router()
  router.get('/healthz', (_request, response) => {
    response.json({ status: 'ok' })
  })
  router.get('/readyz', async (_request, response) => {
    if (isStopping()) {
      response.status(503).json({ status: 'stopping' })
      return
    }
    try {
      await db.raw('SELECT 1')
      response.json({ status: 'ready' })
    } catch {
      response.status(503).json({ status: 'database-unreachable' })
    }
  })
  router.get('/metrics', async (request, response) => {
    if (!isFromHere(request)) {
      response.status(404).end()
      return
    }
    const pool = (db.client as { pool?: { numUsed(): number } }).pool
    metrics.poolInUse.set(pool?.numUsed() ?? 0)
    response.type(metrics.registry.contentType).send(await metrics.registry.metrics())
  })
  return router
}

const LOOPBACK = new Set(['127.0.0.1', '::1', '::ffff:127.0.0.1'])

/** Whether somebody on this machine asks for themselves; a proxy on it passes strangers on. */
function isFromHere(request: Request): boolean {
  const isPassedOn = request.headers['x-forwarded-for'] ?? request.headers.forwarded
  return !isPassedOn && LOOPBACK.has(request.socket.remoteAddress ?? '')
}
