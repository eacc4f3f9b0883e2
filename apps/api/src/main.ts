import { createServer } from 'node:http'
import { makeApp } from './app'
import { makeStripeProvider } from './checkout/stripe-provider'
import { listen, makeServices, readConfigOrExit, stopOnSignal } from './platform/boot'

/** How long requests that are under way may take to finish once the process is told to stop. */
const DRAIN_MS = 10_000

const config = readConfigOrExit()
const services = makeServices(config, { name: 'marram-web' })
let isStopping = false
const app = makeApp(services, {
  payments: makeStripeProvider(config.payments),
  isStopping: () => isStopping,
})
const server = createServer(app)
server.keepAliveTimeout = 65_000
const port = await listen(server, config)
services.log.info({ port, mode: config.mode }, 'web process is up')

stopOnSignal(services.log, async () => {
  isStopping = true
  const closed = new Promise<void>((resolve) => server.close(() => resolve()))
  server.closeIdleConnections()
  const late = setTimeout(() => server.closeAllConnections(), DRAIN_MS)
  await closed
  clearTimeout(late)
  await services.db.destroy()
  services.log.info({}, 'web process has stopped')
})
