import { get } from 'node:http'
import { startMailFake, startOauthFake, startPaymentsFake } from '@marram/fakes'
import { afterEach, describe, expect, it } from 'vitest'

interface Started {
  url: string
  close: () => Promise<void>
}

/** Each stand-in by name, with the options of a test and those that a row of a table changes. */
const STAND_INS = {
  payments: (changes: object) =>
    startPaymentsFake({ secretKey: 'sk_test_marram', webhookSecret: 'whsec_marram', ...changes }),
  mail: (changes: object) => startMailFake({ apiKey: 'SG.marram', ...changes }),
  oauth: (changes: object) =>
    startOauthFake({ clientId: 'marram', clientSecret: 'marram-secret', ...changes }),
}
type Name = keyof typeof STAND_INS
const NAMES = Object.keys(STAND_INS) as Name[]

const running: Started[] = []
const start = async (name: Name, changes: object = {}): Promise<Started> => {
  const started = await STAND_INS[name](changes)
  running.push(started)
  return started
}
afterEach(async () => {
  for (const { close } of running.splice(0)) await close()
})

/** The status of a request that calls the stand-in by another name, as a page elsewhere can. */
const askUnderName = (url: string, host: string) =>
  new Promise<number>((resolve, reject) => {
    get(url, { headers: { host } }, (response) => {
      response.resume()
      resolve(response.statusCode ?? 0)
    }).on('error', reject)
  })

describe('a stand-in', () => {
  it.each(NAMES)('for %s listens on loopback, whether it is asked to or not', async (name) => {
    expect((await start(name)).url).toMatch(/^http:\/\/127\.0\.0\.1:\d+$/)
    expect((await start(name, { host: '127.0.0.1' })).url).toContain('127.0.0.1')
  })

  it.each(
    NAMES.flatMap((name) =>
      ['0.0.0.0', '::', '192.168.1.10', 'marram.example', '127.0.0.1.marram.example'].map(
        (host) => [name, host] as const,
      ),
    ),
  )('for %s refuses to listen on %s', async (name, host) => {
    await expect(start(name, { host })).rejects.toThrow('on this machine only')
  })

  it.each(NAMES)('for %s answers to no name but this machine’s', async (name) => {
    const { url } = await start(name)
    const port = new URL(url).port
    expect(await askUnderName(url, `marram.example:${port}`)).toBe(421)
    expect(await askUnderName(url, `127.0.0.1.marram.example:${port}`)).toBe(421)
    expect(await askUnderName(url, `localhost:${port}`)).not.toBe(421)
    expect(await askUnderName(url, `127.0.0.1:${port}`)).not.toBe(421)
  })

  it.each(['payments', 'mail'] as const)('for %s sends its webhooks nowhere else', async (name) => {
    for (const webhookUrl of [
      'https://marram.example/webhooks',
      'http://127.0.0.1@marram.example/webhooks',
      'not an address',
    ]) {
      await expect(start(name, { webhookUrl })).rejects.toThrow('off this machine')
    }
    for (const webhookUrl of ['http://localhost:1/hook', 'http://[::1]:1/hook']) {
      await expect(start(name, { webhookUrl })).resolves.toBeDefined()
    }
  })

  it.each<[Name, object]>([
    ['payments', { secretKey: 'sk_live_not_a_real_one' }],
    ['payments', { secretKey: 'rk_live_not_a_real_one' }],
    ['mail', { apiKey: `SG.${'a'.repeat(22)}.${'b'.repeat(43)}` }],
    ['oauth', { clientId: '1234-abc.apps.googleusercontent.com' }],
    ['oauth', { clientSecret: 'GOCSPX-not-a-real-one' }],
  ])('for %s refuses a live key, and does not repeat it', async (name, changes) => {
    const starting = start(name, changes)
    await expect(starting).rejects.toThrow('refuses a live')
    for (const key of Object.values(changes))
      await expect(starting).rejects.not.toThrow(String(key))
  })
})
