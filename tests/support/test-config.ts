import type { Config } from '../../apps/api/src/platform/config'
import type { TestDatabase } from './database'

/** The configuration of a process under test. Nothing in it is a secret. */
export function testConfig(given: {
  database: Pick<TestDatabase, 'url' | 'dispatchUrl'>
  publicUrl: string
  paymentsUrl: string
  mailUrl: string
  googleUrl: string
  mailWebhookPublicKey?: string
  poolSize?: number
}): Config {
  return {
    mode: 'test',
    port: 0,
    publicUrl: given.publicUrl,
    secret: 'a secret for tests that guards nothing',
    logLevel: 'silent',
    webFolder: 'dist/web',
    attemptsPerAddress: 100_000,
    database: {
      url: given.database.url,
      dispatchUrl: given.database.dispatchUrl,
      poolSize: given.poolSize ?? 4,
    },
    payments: {
      secretKey: 'sk_test_marram',
      webhookSecret: 'whsec_marram',
      url: given.paymentsUrl,
      platformFeeBasisPoints: 100,
    },
    mail: {
      apiKey: 'SG.marram',
      from: 'post@marram.example',
      url: given.mailUrl,
      webhookPublicKey: given.mailWebhookPublicKey,
    },
    google: { clientId: 'marram', clientSecret: 'marram-secret', url: given.googleUrl },
  }
}
