import { createHmac } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { asSuperuser, readBooks } from '../support/books'
import { openAcademy } from '../support/builders'
import { useWorld } from '../support/use-world'
import { holdRun, readEnrolment, startPaying } from './payment/paying'

const world = await useWorld()

interface Delivery {
  body: string
  /** Seconds by which the signature's time differs from ours. */
  offset?: number
  secret?: string
}

function signatureOf({ body, offset = 0, secret = 'whsec_marram' }: Delivery): string {
  const t = Math.floor(world.clock.now().getTime() / 1000) + offset
  const v1 = createHmac('sha256', secret).update(`${t}.${body}`).digest('hex')
  return `t=${t},v1=${v1}`
}

async function deliver(body: string, signature: string): Promise<number> {
  const response = await fetch(`${world.url}/webhooks/payments`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', 'stripe-signature': signature },
    body,
  })
  return response.status
}

let events = 0
function eventOf(given: { type: string; account?: string | undefined; objectId: string }): string {
  const { type, account, objectId } = given
  const id = `evt_test${(events += 1)}`
  const data = { object: { id: objectId, object: 'checkout.session' } }
  return JSON.stringify({ id, object: 'event', type, account, data })
}

const countEvents = (): Promise<number> =>
  asSuperuser(world, async (db) => {
    const rows = await db('providerEvents').select('eventId')
    return rows.length
  })

/** A checkout that was paid, of which no webhook has told us. */
async function paidUnheard() {
  const hold = await holdRun(world)
  const checkout = await startPaying(hold)
  world.payments.mute(true)
  world.payments.pay(checkout)
  world.payments.mute(false)
  const account = world.payments.state.checkouts[checkout]?.account
  const body = eventOf({ type: 'checkout.session.completed', account, objectId: checkout })
  return { hold, checkout, body }
}

describe('a webhook', () => {
  it('is believed when it is signed with our secret, just now', async () => {
    const { hold, body } = await paidUnheard()
    expect(await deliver(body, signatureOf({ body }))).toBe(204)
    await world.drain()
    expect((await readEnrolment(hold)).state).toBe('confirmed')
  })

  it.each([
    { why: 'unsigned', sign: () => '' },
    { why: 'signed in another form', sign: () => 'v1=beef' },
    { why: 'signed with another secret', sign: (body: string) => ({ body, secret: 'whsec_x' }) },
    { why: 'signed over another body', sign: (body: string) => ({ body: `${body} ` }) },
    { why: 'too old', sign: (body: string) => ({ body, offset: -301 }) },
    { why: 'from the future', sign: (body: string) => ({ body, offset: 301 }) },
  ])('is refused when it is $why, and leaves nothing behind', async ({ sign }) => {
    const { hold, body } = await paidUnheard()
    const before = await countEvents()
    const signed = sign(body)
    const signature = typeof signed === 'string' ? signed : signatureOf(signed)
    expect(await deliver(body, signature)).toBe(400)
    await world.drain()
    expect(await countEvents()).toBe(before)
    expect((await readEnrolment(hold)).state).toBe('held')
  })

  it.each([-300, 300])(
    'is believed %i seconds off, which is as far as clocks may differ',
    async (offset) => {
      const { hold, body } = await paidUnheard()
      expect(await deliver(body, signatureOf({ body, offset }))).toBe(204)
      await world.drain()
      expect((await readEnrolment(hold)).state).toBe('confirmed')
    },
  )

  it('is taken once under its own id', async () => {
    const { body } = await paidUnheard()
    const before = await countEvents()
    for (let time = 0; time < 3; time += 1) {
      expect(await deliver(body, signatureOf({ body }))).toBe(204)
    }
    expect(await countEvents()).toBe(before + 1)
    await world.drain()
  })

  it.each([
    { why: 'an account that is nobody’s here', account: 'acct_nobody' },
    { why: 'no account at all', account: undefined },
  ])('of $why changes nothing', async ({ account }) => {
    const { hold, checkout } = await paidUnheard()
    const body = eventOf({ type: 'checkout.session.completed', account, objectId: checkout })
    expect(await deliver(body, signatureOf({ body }))).toBe(204)
    await world.drain()
    expect((await readEnrolment(hold)).state).toBe('held')
  })

  it('of another academy’s account does not reach this one’s checkout', async () => {
    const { hold, checkout } = await paidUnheard()
    const other = await openAcademy(world)
    const account = Object.keys(world.payments.state.accounts).at(-1)
    const body = eventOf({ type: 'checkout.session.completed', account, objectId: checkout })
    expect(await deliver(body, signatureOf({ body }))).toBe(204)
    await world.drain()

    // The provider has no such checkout on that account: the event cannot be acted upon.
    expect(world.takeErrors().map(({ msg }) => msg)).toEqual(['an event could not be handled'])
    expect((await readEnrolment(hold)).state).toBe('held')
    expect(await readBooks(world, hold.academy.slug)).toEqual({ balances: {}, kinds: {} })
    expect(await readBooks(world, other.slug)).toEqual({ balances: {}, kinds: {} })
  })

  it('of a kind that means nothing to us is thanked for and forgotten', async () => {
    const body = eventOf({ type: 'customer.created', account: 'acct_x', objectId: 'cus_1' })
    expect(await deliver(body, signatureOf({ body }))).toBe(204)
    await world.drain()
  })
})
