import { createServer, type Server } from 'node:http'
import type { Express } from 'express'

/** Starts an app on loopback. A stand-in is never reachable from elsewhere. */
export async function listenOnLoopback(
  app: Express,
  port = 0,
): Promise<{ server: Server; url: string; port: number }> {
  const server = createServer(app)
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, '127.0.0.1', resolve)
  })
  const address = server.address()
  if (address === null || typeof address === 'string') throw new Error('no address to listen on')
  return { server, port: address.port, url: `http://127.0.0.1:${address.port}` }
}

export function closeServer(server: Server): Promise<void> {
  return new Promise((resolve) => {
    server.close(() => resolve())
    server.closeAllConnections()
  })
}
