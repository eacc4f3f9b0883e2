import { defineConfig } from '@playwright/test'

const CHROMIUM = {
  executablePath: '/usr/bin/chromium',
  args: [
    '--no-sandbox',
    '--disable-gpu',
    '--disable-quic',
    '--no-first-run',
    '--disable-background-networking',
    '--disable-component-update',
    '--disable-sync',
  ],
}

const DESK = { width: 1440, height: 900 }
const PHONE = { width: 390, height: 844 }

export default defineConfig({
  testDir: '.',
  outputDir: '../../.marram/results/browser',
  globalSetup: './template.setup.ts',
  workers: 2,
  timeout: 240_000,
  expect: { timeout: 10_000 },
  reporter: [['line'], ['json']],
  use: {
    launchOptions: CHROMIUM,
    locale: 'en-IE',
    timezoneId: 'Europe/Dublin',
    screenshot: 'only-on-failure',
  },
  projects: [
    { name: 'desk', use: { viewport: DESK } },
    { name: 'phone', use: { viewport: PHONE, hasTouch: true } },
  ],
})
