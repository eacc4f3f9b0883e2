import { describe, expect, it } from 'vitest'
import { readConfig } from './config'

const PRODUCTION = {
  MARRAM_MODE: 'production',
  MARRAM_PUBLIC_URL: 'https://marram.example',
  MARRAM_SECRET: 'thirty-two characters, or longer',
  MARRAM_DATABASE_URL: 'postgres://marram_app@db.example/marram',
  MARRAM_DISPATCH_DATABASE_URL: 'postgres://marram_dispatch@db.example/marram',
  MARRAM_PAYMENTS_SECRET_KEY: 'sk_live_example',
  MARRAM_PAYMENTS_WEBHOOK_SECRET: 'whsec_example',
  MARRAM_MAIL_API_KEY: 'mail-key-example',
  MARRAM_MAIL_FROM: 'post@marram.example',
  MARRAM_MAIL_WEBHOOK_PUBLIC_KEY: 'public-key-example',
  MARRAM_GOOGLE_CLIENT_ID: 'marram',
  MARRAM_GOOGLE_CLIENT_SECRET: 'secret-example',
}

describe('the configuration of production', () => {
  it('is read when it is whole', () => {
    const { mail } = readConfig(PRODUCTION)
    expect(mail.webhookPublicKey).toBe('public-key-example')
  })

  it.each([
    {
      without: 'the key of who tells of mail',
      change: { MARRAM_MAIL_WEBHOOK_PUBLIC_KEY: undefined },
    },
    { without: 'a key that is more than empty', change: { MARRAM_MAIL_WEBHOOK_PUBLIC_KEY: '' } },
    { without: 'a live key', change: { MARRAM_PAYMENTS_SECRET_KEY: 'sk_test_example' } },
    { without: 'https', change: { MARRAM_PUBLIC_URL: 'http://marram.example' } },
    { without: 'the providers themselves', change: { MARRAM_MAIL_URL: 'http://127.0.0.1:1' } },
  ])('is refused without $without', ({ change }) => {
    expect(() => readConfig({ ...PRODUCTION, ...change })).toThrow(/MARRAM_|Production/)
  })

  it('is refused elsewhere with a live key', () => {
    expect(() => readConfig({ ...PRODUCTION, MARRAM_MODE: 'demo' })).toThrow(/live/)
  })
})
