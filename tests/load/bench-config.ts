import type { Config } from '../../apps/api/src/platform/config'
import { testConfig } from '../support/test-config'
import type { BenchDatabase } from './database'
import { POOL_SIZE } from './processes'

/** Where the product believes to be reached; its own pages would send this as their origin. */
export const ORIGIN = 'http://127.0.0.1'

/** The configuration of the product while it is measured: as in production, log lines too. */
export function benchConfig(database: Pick<BenchDatabase, 'url' | 'dispatchUrl'>): Config {
  // Nobody answers there, and nothing that is measured asks.
  const nowhere = 'http://127.0.0.1:9'
  const config = testConfig({
    database,
    publicUrl: ORIGIN,
    paymentsUrl: nowhere,
    mailUrl: nowhere,
    googleUrl: nowhere,
    poolSize: POOL_SIZE,
  })
  return { ...config, logLevel: 'info' }
}
