import type { MailFake } from '@marram/fakes'
import { EventWebhook, EventWebhookHeader } from '@sendgrid/eventwebhook'
import type { MailService } from '@sendgrid/mail'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { control } from '../support/control'
import { letterTo, startMail } from '../support/mail'
import { startReceiver, type WebhookReceiver } from '../support/webhooks'

const NOW = new Date('2027-04-06T10:00:00Z')
const ALL = ['processed', 'delivered', 'bounce', 'dropped', 'spamreport'] as const

interface MailEvent {
  sg_event_id: string
  sg_message_id: string
  event: string
  email: string
  timestamp: number
  reason?: string
  type?: string
}

let receiver: WebhookReceiver
let fake: MailFake
let mail: MailService

beforeEach(async () => {
  receiver = await startReceiver()
  const { url: webhookUrl } = receiver
  ;({ fake, mail } = await startMail({ now: () => NOW, webhookUrl, webhookEvents: ALL }))
})
afterEach(async () => {
  await fake.close()
  await receiver.close()
})

const header = (index: number, name: string) =>
  String(receiver.received[index]?.headers[name.toLowerCase()])
const isGenuine = (index: number, key = fake.webhookPublicKey) => {
  const verifier = new EventWebhook()
  return verifier.verifySignature(
    verifier.convertPublicKeyToECDSA(key),
    receiver.received[index]!.body,
    header(index, EventWebhookHeader.SIGNATURE()),
    header(index, EventWebhookHeader.TIMESTAMP()),
  )
}
const eventsIn = (index: number) => JSON.parse(receiver.received[index]!.body) as MailEvent[]
const told = () => receiver.received.flatMap((_delivery, index) => eventsIn(index))
const send = async (to: string) => {
  await mail.send(letterTo(to))
  await fake.flush()
}

describe('the event webhook of the mail stand-in', () => {
  it('is signed, so that the vendor’s verifier accepts it and nothing else', async () => {
    await send('golfer@mail.example')
    expect(isGenuine(0)).toBe(true)
    expect(header(0, EventWebhookHeader.TIMESTAMP())).toBe(String(NOW.getTime() / 1000))
    const other = await startMail()
    expect(isGenuine(0, other.fake.webhookPublicKey)).toBe(false)
    await other.fake.close()
    receiver.received[0]!.body += ' '
    expect(isGenuine(0)).toBe(false)
  })

  it('tells that a letter was delivered', async () => {
    await send('golfer@mail.example')
    const { id } = fake.messages[0]!
    expect(told()).toMatchObject([
      { event: 'processed', email: 'golfer@mail.example' },
      { event: 'delivered', email: 'golfer@mail.example', timestamp: NOW.getTime() / 1000 },
    ])
    for (const event of told()) expect(event.sg_message_id).toMatch(new RegExp(`^${id}\\.`))
  })

  it.each([
    ['bounce@mail.example', ['processed', 'bounce'], 'bounce'],
    ['drop@mail.example', ['dropped'], 'dropped'],
    ['spam@mail.example', ['processed', 'delivered', 'spamreport'], 'spamreport'],
    ['BOUNCE@mail.example', ['processed', 'bounce'], 'bounce'],
  ])('tells what becomes of a letter to %s', async (to, events, fate) => {
    await send(to)
    expect(told().map(({ event }) => event)).toEqual(events)
    expect(new Set(told().map(({ sg_event_id }) => sg_event_id)).size).toBe(events.length)
    expect(fake.messagesTo(to)).toMatchObject([{ fate }])
  })

  it('keeps to what it is set up to tell, which is what keeps mail from an address', async () => {
    const usual = await startMail({ webhookUrl: receiver.url })
    for (const name of ['golfer', 'bounce', 'drop', 'spam']) {
      await usual.mail.send(letterTo(`${name}@mail.example`))
      await usual.fake.flush()
    }
    expect(told().map(({ event }) => event)).toEqual(['bounce', 'dropped', 'spamreport'])
    await usual.fake.close()
  })

  it('says why', async () => {
    await send('bounce@mail.example')
    await send('drop@mail.example')
    const [, bounce, dropped] = told()
    expect(bounce).toMatchObject({ type: 'bounce', status: '5.1.1' })
    expect(bounce?.reason).toContain('no such mailbox')
    expect(dropped).toMatchObject({ reason: 'Invalid' })
  })

  it('drops what comes after a bounce or a complaint, until the mailbox is forgotten', async () => {
    await send('bounce@mail.example')
    await send('Bounce@mail.example')
    await send('spam@mail.example')
    await send('spam@mail.example')
    const dropped = told().filter(({ event }) => event === 'dropped')
    expect(dropped.map(({ reason }) => reason)).toEqual([
      'Bounced Address',
      'Spam Reporting Address',
    ])
    await control(fake, 'reset')
    await send('bounce@mail.example')
    expect(told().at(-1)).toMatchObject({ event: 'bounce' })
  })

  it('comes again until it is thanked for, and twice when told to', async () => {
    receiver.refuseNext(1)
    await send('golfer@mail.example')
    expect(receiver.received).toHaveLength(2)
    expect(eventsIn(1)).toEqual(eventsIn(0))
    await control(fake, 'duplicate-next', { count: 1 })
    await send('golfer@mail.example')
    expect(receiver.received).toHaveLength(4)
    expect(isGenuine(3)).toBe(true)
  })

  it('gives its key to other processes', async () => {
    const response = await fetch(`${fake.url}/_control/public-key`)
    expect(await response.json()).toEqual({ publicKey: fake.webhookPublicKey })
  })
})
