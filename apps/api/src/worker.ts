import { checkoutListeners } from './checkout/listeners'
import { makeStripeProvider } from './checkout/stripe-provider'
import { messagingListeners } from './messaging/listeners'
import { makeMessenger } from './messaging/messaging'
import { makeSendgridProvider } from './messaging/sendgrid-provider'
import { makeServices, readConfigOrExit, stopOnSignal } from './platform/boot'
import { connect } from './platform/db/connect'
import { makeDispatcher } from './platform/outbox/dispatch'
import { startSweeping } from './platform/outbox/sweep'

const SWEEP_EVERY_MS = 2_000

const config = readConfigOrExit()
const services = makeServices(config, { name: 'marram-worker' })
const { log } = services
const payments = makeStripeProvider(config.payments)
const messenger = makeMessenger(services, makeSendgridProvider(config.mail))
const dispatch = connect({ url: config.database.dispatchUrl, poolSize: 2, name: 'marram-dispatch' })

const dispatcher = makeDispatcher({
  url: config.database.dispatchUrl,
  listeners: {
    checkout: checkoutListeners(services, payments),
    messaging: messagingListeners(services, messenger),
  },
  onError: (err, queue) => log.error({ err, queue }, 'an event could not be handled'),
})
await dispatcher.start()
const sweeping = startSweeping(services, { dispatch, everyMs: SWEEP_EVERY_MS, log })
log.info({ mode: config.mode }, 'worker is up')

stopOnSignal(log, async () => {
  await sweeping.stop()
  await dispatcher.stop()
  await dispatch.destroy()
  await services.db.destroy()
  log.info({}, 'worker has stopped')
})
