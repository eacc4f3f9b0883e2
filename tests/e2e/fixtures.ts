import AxeBuilder from '@axe-core/playwright'
import { test as base, expect, type Browser, type Page } from '@playwright/test'
import { startProduct, type Product } from './product'

interface PerWorker {
  product: Product
}

interface PerTest {
  /** Opens a browser of one more person, who knows nothing of the others. */
  newPerson: (size?: { width: number; height: number }) => Promise<Page>
}

export const test = base.extend<PerTest, PerWorker>({
  product: [
    async ({}, use) => {
      const product = await startProduct()
      await use(product)
      await product.stop()
    },
    { scope: 'worker' },
  ],
  newPerson: async ({ browser, product, viewport }, use) => {
    const complaints: string[] = []
    const closing: (() => Promise<void>)[] = []
    await use(async (size) => {
      const page = await openFor(browser, product, size ?? viewport ?? { width: 1440, height: 900 })
      listen(page, complaints)
      closing.push(() => page.context().close())
      return page
    })
    for (const close of closing) await close()
    expect(complaints, 'the console says nothing that was not expected').toEqual([])
  },
})

export { expect }

async function openFor(
  browser: Browser,
  { url, begins }: Product,
  viewport: { width: number; height: number },
): Promise<Page> {
  const context = await browser.newContext({
    baseURL: url,
    viewport,
    locale: 'en-IE',
    timezoneId: 'Europe/Dublin',
    reducedMotion: 'reduce',
  })
  // The browser keeps the time of the product, and goes on from there.
  await context.clock.install({ time: begins })
  return context.newPage()
}

/** What the journeys provoke on purpose, each as status, method and path. */
const EXPECTED_REFUSALS = [
  // A password that is too short.
  /^422 POST \/api\/accounts$/,
  // A card that is declined.
  /^402 POST \/pay\//,
]

function listen(page: Page, complaints: string[]): void {
  page.on('console', (message) => {
    const text = message.text()
    const isRefusal = /the server responded with a status of 4\d\d/.test(text)
    if (['error', 'warning'].includes(message.type()) && !isRefusal) {
      complaints.push(`${page.url()}: ${text.slice(0, 300)}`)
    }
  })
  page.on('response', (response) => {
    const status = response.status()
    const what = `${status} ${response.request().method()} ${new URL(response.url()).pathname}`
    if (status >= 400 && !EXPECTED_REFUSALS.some((pattern) => pattern.test(what))) {
      complaints.push(`${page.url()}: ${what}`)
    }
  })
  page.on('pageerror', (error) => complaints.push(`${page.url()}: ${error.message}`))
}

const THEMES = ['light', 'dusk'] as const

/** Looks a page over in both themes: nothing for axe to find, and nothing over the edge. */
export async function lookOver(page: Page): Promise<void> {
  await expect(page.getByRole('heading').first()).toBeVisible()
  await expect(page.locator('.skeleton')).toHaveCount(0)
  for (const theme of THEMES) {
    await page.evaluate((name) => {
      if (name === 'dusk') document.documentElement.dataset['theme'] = 'dusk'
      else delete document.documentElement.dataset['theme']
    }, theme)
    const { violations } = await new AxeBuilder({ page }).analyze()
    const found = violations.map(
      ({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 160)).join(' | ')}`,
    )
    expect(found, `${page.url()} in ${theme}`).toEqual([])
  }
  await page.evaluate(() => delete document.documentElement.dataset['theme'])
  const over = await page.evaluate(
    () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
  )
  expect(over, `${page.url()} scrolls sideways`).toBe(0)
}
