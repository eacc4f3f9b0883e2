import type { Knex } from 'knex'
import type { Clock } from './clock'
import type { Config } from './config'
import type { Logger } from './logging'
import type { Metrics } from './metrics'
import type { Outbox } from './outbox/outbox'

/** What every use case may reach: made once at boot and passed in, never imported. */
export interface Services {
  config: Config
  db: Knex
  clock: Clock
  outbox: Outbox
  log: Logger
  metrics: Metrics
}
