import { existsSync, mkdirSync, readFileSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { chromium } from '@playwright/test'

const root = resolve(dirname(fileURLToPath(import.meta.url)), '..')
const folder = join(root, 'docs', 'pictures')
const PASSWORD = 'marram and dunes'
const DESK = { width: 1280, height: 800 }
const PHONE = { width: 390, height: 844 }

/** The pictures of the README: who looks, at what, on which screen. */
const PICTURES = [
  { name: 'academy-page', size: DESK, path: () => '/kittiwake-links' },
  { name: 'clinic-page', size: PHONE, path: () => '/kittiwake-links/clinics/driver-without-fear' },
  { name: 'week-board', as: 'aoife@kittiwake.example', size: DESK, path: () => desk('week') },
  { name: 'money-card', as: 'aoife@kittiwake.example', size: DESK, path: () => desk('money') },
  {
    name: 'day-sheet',
    as: 'ruairi@kittiwake.example',
    size: PHONE,
    theme: 'dusk',
    path: (today) => `${desk('today')}?day=${lastSaturday(today)}`,
  },
]

const desk = (page) => `/kittiwake-links/desk/${page}`

/** Takes the README's pictures from the demo that runs in this checkout. */
async function main() {
  const lock = join(root, '.marram', 'demo', 'running.json')
  const { url } = existsSync(lock) ? JSON.parse(readFileSync(lock, 'utf8') || '{}') : {}
  if (!url) throw new Error('The demo does not run. Start it with "npm start" first.')
  mkdirSync(folder, { recursive: true })
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking'],
  })
  for (const picture of PICTURES) {
    const context = await browser.newContext({
      baseURL: url,
      viewport: picture.size,
      locale: 'en-IE',
    })
    const page = await context.newPage()
    if (picture.as) await signIn(page, picture.as)
    await page.goto(picture.path(new Date()))
    if (picture.theme) await page.evaluate(setTheme, picture.theme)
    await page.getByRole('heading').first().waitFor()
    await page.waitForLoadState('networkidle')
    await page.evaluate(() => document.fonts.ready)
    await page.screenshot({ path: join(folder, `${picture.name}.png`) })
    process.stdout.write(`docs/pictures/${picture.name}.png\n`)
    await context.close()
  }
  await browser.close()
}

async function signIn(page, email) {
  await page.goto('/sign-in')
  await page.getByLabel('E-mail').fill(email)
  await page.getByLabel('Password').fill(PASSWORD)
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await page.waitForURL((address) => address.pathname !== '/sign-in')
}

const setTheme = (theme) => {
  document.documentElement.dataset.theme = theme
}

function lastSaturday(today) {
  const back = (today.getUTCDay() + 1) % 7 || 7
  return new Date(today.getTime() - back * 86_400_000).toISOString().slice(0, 10)
}

await main()
