import type { PaymentsProvider } from '../checkout/provider'
import { systemClock, type Clock } from '../platform/clock'

/** The payments stand-in as the demo uses it: people of the demo pay without a browser. */
export interface DemoProvider extends PaymentsProvider {
  /** Answers the last onboarding page as its owner would. */
  finishOnboarding(): Promise<void>
  /** Pays a checkout by a card that is good, at the time of the demo's clock. */
  payCheckout(checkoutUrl: string, at: Date): Promise<void>
}

/**
 * Adds to the provider what only the stand-in can do. Its clock goes with the demo's, and its webhooks
 * are held back while the season is played: the loader tells the use cases itself.
 */
export async function makeDemoProvider(
  provider: PaymentsProvider,
  { url, clock }: { url: string; clock: Clock },
): Promise<DemoProvider & { release(): Promise<void> }> {
  let onboarding = ''
  let offsetSeconds = 0
  const control = async (name: string, body: object = {}) => {
    const response = await fetch(`${url}/_control/${name}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    })
    if (!response.ok) {
      throw new Error(`the payments stand-in refused ${name}: ${await response.text()}`)
    }
  }
  const keepTime = async (at: Date) => {
    const wanted = Math.round((at.getTime() - systemClock.now().getTime()) / 1000)
    if (wanted !== offsetSeconds)
      await control('advance-clock', { seconds: wanted - offsetSeconds })
    offsetSeconds = wanted
  }
  await control('mute-webhooks')
  return {
    ...provider,
    async createCheckout(checkout) {
      await keepTime(clock.now())
      return provider.createCheckout(checkout)
    },
    async createOnboarding(link) {
      onboarding = await provider.createOnboarding(link)
      return onboarding
    },
    async finishOnboarding() {
      await control('finish-onboarding', { url: onboarding })
    },
    payCheckout: (checkoutUrl, at) =>
      control('pay', {
        session: new URL(checkoutUrl).pathname.split('/').at(-1),
        card: '4242424242424242',
        created: Math.floor(at.getTime() / 1000),
      }),
    async release() {
      await keepTime(systemClock.now())
      await control('unmute-webhooks')
    },
  }
}
