import { createServer, type Server } from 'node:http'
import express, { type Express } from 'express'
import { UnsafeError, isLoopback, refuseOtherNames } from './safety'

/** An app for a stand-in: it answers to names of this machine only. */
export function makeApp(): Express {
  const app = express()
  app.disable('x-powered-by')
  app.use(refuseOtherNames)
  return app
}

/** Starts an app on loopback. @throws UnsafeError for any other host. */
export async function listenOnLoopback(
  app: Express,
  { host = '127.0.0.1', port = 0 }: { host?: string | undefined; port?: number | undefined },
): Promise<{ server: Server; url: string; port: number }> {
  if (!isLoopback(host)) throw new UnsafeError('A stand-in listens on this machine only.')
  const server = createServer(app)
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, host, resolve)
  })
  const address = server.address()
  if (address === null || typeof address === 'string') throw new Error('no address to listen on')
  const name = host.includes(':') ? `[${host}]` : host
  return { server, port: address.port, url: `http://${name}:${address.port}` }
}

export function closeServer(server: Server): Promise<void> {
  return new Promise((resolve) => {
    server.close(() => resolve())
    server.closeAllConnections()
  })
}
