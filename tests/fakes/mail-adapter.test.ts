import { startMailFake, type MailFake } from '@marram/fakes'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { makeSendgridProvider } from '../../apps/api/src/messaging/sendgrid-provider'

let fake: MailFake

beforeAll(async () => {
  fake = await startMailFake({ apiKey: 'SG.marram' })
})
afterAll(() => fake.close())

describe('the product’s mail adapter', () => {
  it.each(['REQUEST', 'CANCEL'] as const)('sends a calendar part to %s', async (method) => {
    const provider = makeSendgridProvider({
      apiKey: 'SG.marram',
      from: 'post@marram.example',
      url: fake.url,
      webhookPublicKey: undefined,
    })
    const text = `BEGIN:VCALENDAR\r\nMETHOD:${method}\r\nSUMMARY:Übung\r\nEND:VCALENDAR\r\n`
    const id = await provider.send({
      to: `${method.toLowerCase()}@mail.example`,
      fromName: 'Kittiwake Links Academy',
      subject: 'Your place',
      text: 'See you on Tuesday.',
      html: '<p>See you on Tuesday.</p>',
      calendar: { method, text },
    })
    const [letter, ...more] = fake.messagesTo(`${method.toLowerCase()}@mail.example`)
    expect(more).toEqual([])
    expect(letter).toMatchObject({
      id,
      fromEmail: 'post@marram.example',
      fromName: 'Kittiwake Links Academy',
      attachments: [{ filename: 'clinic.ics', type: `text/calendar; method=${method}` }],
    })
    const [part] = letter?.attachments ?? []
    expect(Buffer.from(part?.content ?? '', 'base64').toString('utf8')).toBe(text)
  })
})
