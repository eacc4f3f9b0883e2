import {
  startMailFake,
  startOauthFake,
  startPaymentsFake,
  type MailFake,
  type OauthFake,
  type OauthFakeOptions,
  type PaymentsFake,
} from '@marram/fakes'
import type { Clock } from '../../apps/api/src/platform/clock'
import { testConfig } from './test-config'

/** The stand-ins of a world, each on a port of its own. */
export interface Fakes {
  payments: PaymentsFake
  mail: MailFake
  oauth: OauthFake
}

export async function startFakes(given: {
  url: string
  clock: Clock
  people: OauthFakeOptions['people']
}): Promise<Fakes> {
  const { url, clock, people } = given
  const known = testConfig({
    database: { url: '', dispatchUrl: '' },
    publicUrl: url,
    paymentsUrl: '',
    mailUrl: '',
    googleUrl: '',
  })
  const { secretKey, webhookSecret } = known.payments
  const { clientId, clientSecret } = known.google
  const now = () => clock.now()
  const [payments, mail, oauth] = await Promise.all([
    startPaymentsFake({ secretKey, webhookSecret, webhookUrl: `${url}/webhooks/payments`, now }),
    startMailFake({ apiKey: known.mail.apiKey, webhookUrl: `${url}/webhooks/mail`, now }),
    startOauthFake({ clientId, clientSecret, now, ...(people ? { people } : {}) }),
  ])
  return { payments, mail, oauth }
}
