import type { Server } from 'node:http'
import { systemClock, type Clock } from './clock'
import { readConfig, type Config } from './config'
import { connect } from './db/connect'
import { makeLogger } from './logging'
import { makeMetrics } from './metrics'
import { makeOutbox } from './outbox/outbox'
import type { Services } from './services'

/** A process that has not stopped by then is ended. */
const STOP_MS = 15_000

/** Makes what every use case may reach, from the configuration. */
export function makeServices(config: Config, given: { name: string; clock?: Clock }): Services {
  return {
    config,
    db: connect({
      url: config.database.url,
      poolSize: config.database.poolSize,
      name: given.name,
    }),
    clock: given.clock ?? systemClock,
    outbox: makeOutbox(),
    log: makeLogger({ level: config.logLevel }),
    metrics: makeMetrics(),
  }
}

/** Reads the configuration or ends the process with the sentence that says what is wrong. */
export function readConfigOrExit(): Config {
  try {
    return readConfig(process.env)
  } catch (error) {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
    process.exit(78)
  }
}

/** Listens on loopback, or on every address in production behind its proxy. */
export function listen(
  server: Server,
  { port, mode }: Pick<Config, 'port' | 'mode'>,
): Promise<number> {
  const host = mode === 'production' ? '0.0.0.0' : '127.0.0.1'
  return new Promise((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, host, () => {
      const address = server.address()
      resolve(typeof address === 'object' && address ? address.port : port)
    })
  })
}

/**
 * Runs `stop` once at the first SIGTERM or SIGINT, then ends the process. A process that was started
 * with a pipe for its input also stops when whoever started it is gone, however that came.
 */
export function stopOnSignal(log: Services['log'], stop: () => Promise<void>): void {
  let isStopping = false
  let end = (code: number): void => process.exit(code)
  const stopOnce = () => {
    if (isStopping) return
    isStopping = true
    setTimeout(() => end(1), STOP_MS).unref()
    stop().then(
      () => end(0),
      (err: unknown) => {
        log.error({ err }, 'stopping failed')
        end(1)
      },
    )
  }
  process.on('SIGTERM', stopOnce)
  process.on('SIGINT', stopOnce)
  if (process.env['MARRAM_STOP_WITH_PARENT'] === 'yes') {
    process.stdin.on('end', () => {
      // Nobody reads our lines any more: an ordinary exit would wait for ever to write the last ones.
      end = () => process.kill(process.pid, 'SIGKILL')
      stopOnce()
    })
    process.stdin.resume()
  }
}
