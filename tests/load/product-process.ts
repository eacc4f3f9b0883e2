import { createServer } from 'node:http'
import { makeApp } from '../../apps/api/src/app'
import { makeStripeProvider } from '../../apps/api/src/checkout/stripe-provider'
import { listen, makeServices } from '../../apps/api/src/platform/boot'
import { benchConfig } from './bench-config'
import { sayPort } from './processes'

const config = benchConfig({
  url: process.env['BENCH_DATABASE_URL'] ?? '',
  // Only jobs connect there, and none are handled here.
  dispatchUrl: '',
})
const services = makeServices(config, { name: 'bench-product' })
// The built web app is not asked for anything here, and may not have been built yet.
const app = makeApp(services, { payments: makeStripeProvider(config.payments), hasPages: false })
sayPort(await listen(createServer(app), config))
