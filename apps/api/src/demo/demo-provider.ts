import type { PaymentsProvider } from '../checkout/provider'

/** The payments stand-in as the demo uses it: people of the demo pay without a browser. */
export interface DemoProvider extends PaymentsProvider {
  /** Answers the last onboarding page as its owner would. */
  finishOnboarding(): Promise<void>
  /** Pays a checkout by a card that is good, at the time of the demo's clock. */
  payCheckout(checkoutUrl: string, at: Date): Promise<void>
}

/**
 * Adds to the provider what only the stand-in can do. Its webhooks are held back while the season
 * is played: the loader tells the use cases itself.
 */
export async function makeDemoProvider(
  provider: PaymentsProvider,
  url: string,
): Promise<DemoProvider & { release(): Promise<void> }> {
  let onboarding = ''
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
  await control('mute-webhooks')
  return {
    ...provider,
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
    release: () => control('unmute-webhooks'),
  }
}
