import { spawn } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { startMailFake } from '@marram/fakes'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { letterTo, mailSdkFor } from '../support/mail'
import {
  SECRET_KEY,
  checkoutParams,
  connectAccount,
  sdkFor,
  startPayments,
} from '../support/payments'

const RUN = fileURLToPath(new URL('../../packages/fakes/src/run.ts', import.meta.url))

let folder: string
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'marram-fakes-'))
})
afterAll(() => rmSync(folder, { recursive: true, force: true }))

describe('a stand-in that was stopped', () => {
  it('for payments goes on where it was', async () => {
    const stateFile = join(folder, 'payments.json')
    const first = await startPayments({ stateFile })
    const stripeAccount = await connectAccount(first.stripe, first.fake)
    const params = checkoutParams(Math.floor(Date.now() / 1000))
    const options = { stripeAccount, idempotencyKey: 'order:1:checkout:1' }
    const { id } = await first.stripe.checkout.sessions.create(params, options)
    first.fake.advanceClock(60)
    await first.fake.close()

    const second = await startPayments({ stateFile })
    expect(second.fake.pay(id)).toBeNull()
    const paid = await second.stripe.checkout.sessions.retrieve(id, {}, { stripeAccount })
    expect(paid.payment_status).toBe('paid')
    expect(second.fake.state.clockOffsetSeconds).toBe(60)
    const again = await second.stripe.checkout.sessions.create(params, options)
    expect(again.id).toBe(id)
    await second.fake.close()
  })

  it('for mail has the letters, and signs by the same key', async () => {
    const options = { apiKey: 'SG.marram', stateFile: join(folder, 'mail.json') }
    const first = await startMailFake(options)
    await mailSdkFor(first).send(letterTo('bounce@mail.example'))
    await first.close()

    const second = await startMailFake(options)
    expect(second.webhookPublicKey).toBe(first.webhookPublicKey)
    expect(second.messages).toEqual(first.messages)
    await mailSdkFor(second).send(letterTo('bounce@mail.example'))
    expect(second.messages.map(({ fate }) => fate)).toEqual(['bounce', 'dropped'])
    const [before, after] = second.messages
    expect(after?.id).not.toBe(before?.id)
    await second.close()
  })
})

describe('a stand-in whose kept state is an older one’s', () => {
  it('starts with what it can read', async () => {
    const stateFile = join(folder, 'older.json')
    writeFileSync(stateFile, JSON.stringify({ messages: [], next: 40 }))
    const mail = await startMailFake({ apiKey: 'SG.marram', stateFile })
    expect(mail.messages).toEqual([])
    await mail.close()
    writeFileSync(stateFile, JSON.stringify({ accounts: {}, next: 40 }))
    const { fake, stripe } = await startPayments({ stateFile })
    expect(await connectAccount(stripe, fake)).toBeTruthy()
    await fake.close()
  })
})

describe('the program that starts all three', () => {
  const environment = {
    PATH: process.env['PATH'],
    MARRAM_PAYMENTS_SECRET_KEY: SECRET_KEY,
    MARRAM_PAYMENTS_WEBHOOK_SECRET: 'whsec_marram',
    MARRAM_FAKES_PAYMENTS_WEBHOOK_URL: 'http://127.0.0.1:9/webhooks/payments',
    MARRAM_MAIL_API_KEY: 'SG.marram',
    MARRAM_FAKES_MAIL_WEBHOOK_URL: 'http://127.0.0.1:9/webhooks/mail',
    MARRAM_GOOGLE_CLIENT_ID: 'marram',
    MARRAM_GOOGLE_CLIENT_SECRET: 'marram-secret',
    MARRAM_STOP_WITH_PARENT: 'yes',
  }
  const run = (changes: Record<string, string | undefined>) => {
    const child = spawn(process.execPath, ['--import', 'tsx', RUN], {
      env: { ...environment, ...changes },
    })
    let said = ''
    child.stderr.on('data', (chunk: Buffer) => (said += chunk.toString()))
    const line = new Promise<string>((resolve) => {
      child.stdout.once('data', (chunk: Buffer) => resolve(chunk.toString()))
    })
    const end = new Promise<number | null>((resolve) => child.once('close', resolve))
    return { child, line, end, errors: () => said }
  }

  it(
    'says in one line where they are, and stops with its parent',
    { timeout: 30_000 },
    async () => {
      const { child, line, end } = run({ MARRAM_FAKES_STATE_DIR: join(folder, 'program') })
      // The line is read by the start command, which knows these names.
      const said = JSON.parse(await line) as Record<string, string>
      expect(Object.keys(said).sort()).toEqual([
        'mail',
        'mailWebhookPublicKey',
        'oauth',
        'payments',
      ])
      for (const name of ['payments', 'mail'] as const) {
        expect((await fetch(said[name] ?? '')).status).toBe(200)
      }
      const port = Number(new URL(said['payments'] ?? '').port)
      const { id } = await sdkFor({ port }).accounts.create({ email: 'owner@mail.example' })
      child.stdin.end()
      expect(await end).toBe(0)
      const kept = readFileSync(join(folder, 'program', 'payments.json'), 'utf8')
      expect(kept).toContain(id)
    },
  )

  it('names what is missing, or what it refuses', { timeout: 30_000 }, async () => {
    const missing = run({ MARRAM_MAIL_API_KEY: undefined })
    expect(await missing.end).toBe(78)
    expect(missing.errors()).toContain('MARRAM_MAIL_API_KEY is missing.')
    const live = run({ MARRAM_PAYMENTS_SECRET_KEY: 'sk_live_not_a_real_one' })
    expect(await live.end).toBe(78)
    expect(live.errors()).toBe('The stand-in refuses a live payments key.\n')
  })
})
