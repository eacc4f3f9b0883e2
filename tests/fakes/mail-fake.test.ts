import type { MailFake } from '@marram/fakes'
import type { MailService } from '@sendgrid/mail'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { letterTo, mailSdkFor, startMail } from '../support/mail'
import { control } from '../support/control'

const NOW = new Date('2027-04-06T10:00:00Z')
const CALENDAR = 'BEGIN:VCALENDAR\r\nMETHOD:REQUEST\r\nEND:VCALENDAR\r\n'

let fake: MailFake
let mail: MailService

beforeAll(async () => {
  ;({ fake, mail } = await startMail({ now: () => NOW }))
})
afterAll(() => fake.close())

const attached = (type: string) => ({
  attachments: [
    {
      content: Buffer.from(CALENDAR).toString('base64'),
      filename: 'clinic.ics',
      type,
      disposition: 'attachment',
    },
  ],
})
/** The body of a request that was refused, and its status, as the SDK hands them on. */
const refusalOf = async (sending: Promise<unknown>) => {
  const error: unknown = await sending.then(
    () => Promise.reject(new Error('it was accepted')),
    (reason: unknown) => reason,
  )
  const { code, response } = error as {
    code: number
    response: { body: { errors: { message: string; field: string | null }[] } }
  }
  return {
    code,
    errors: response.body.errors,
    fields: response.body.errors.map((one) => one.field),
  }
}

describe('the mail stand-in', () => {
  it('accepts a letter and keeps it as it was sent', async () => {
    const [response] = await mail.send(letterTo('golfer@mail.example'))
    expect(response.statusCode).toBe(202)
    const { 'x-message-id': id } = response.headers as Record<string, string>
    expect(fake.messagesTo('golfer@mail.example')).toEqual([
      {
        id,
        to: 'golfer@mail.example',
        fromEmail: 'post@marram.example',
        fromName: 'Kittiwake Links Academy',
        subject: 'Your place: Tuesday wedges',
        text: 'See you on Tuesday. http://127.0.0.1:9/kittiwake',
        html: '<html><head></head><body><p>See you on <b>Tuesday</b>.</p></body></html>',
        attachments: [],
        fate: 'delivered',
        at: NOW.toISOString(),
      },
    ])
  })

  it('shows it on its pages, with its calendar part to read and to take', async () => {
    const type = 'text/calendar; method=REQUEST'
    await mail.send(letterTo('page@mail.example', { subject: 'Rain & <wind>', ...attached(type) }))
    const list = await (await fetch(`${fake.url}/?to=page@mail.example`)).text()
    expect(list).toContain('Rain &amp; &lt;wind&gt;')
    expect(list).not.toContain('golfer@mail.example')
    const path = /href="(\/messages\/[^"]+)"/.exec(list)?.[1] ?? ''
    const letter = await (await fetch(`${fake.url}${path}`)).text()
    expect(letter).toContain('METHOD:REQUEST')
    expect(letter).toContain('<a href="http://127.0.0.1:9/kittiwake">')
    expect(letter).toContain('&lt;b&gt;Tuesday&lt;/b&gt;')
    const part = await fetch(`${fake.url}${path}/attachments/0`)
    expect(await part.text()).toBe(CALENDAR)
    expect(part.headers.get('content-type')).toMatch(/^text\/calendar;.*method=REQUEST/)
    expect(part.headers.get('content-disposition')).toBe('attachment; filename="clinic.ics"')
    expect((await fetch(`${fake.url}${path}/attachments/1`)).status).toBe(404)
    expect((await fetch(`${fake.url}/messages/nothing`)).status).toBe(404)
  })

  it('keeps a letter for each of those it is for', async () => {
    const to = ['a@mail.example', 'b@mail.example']
    await mail.send(letterTo('', { to, cc: 'c@mail.example', bcc: 'd@mail.example' }))
    for (const address of [...to, 'c@mail.example', 'd@mail.example']) {
      expect(fake.messagesTo(address)).toHaveLength(1)
    }
    const ids = fake.messages.map(({ id }) => id)
    expect(new Set(ids).size).toBe(ids.length)
    await mail.sendMultiple({ ...letterTo(''), to: ['e@mail.example', 'f@mail.example'] })
    expect(fake.messagesTo('f@mail.example')).toHaveLength(1)
  })

  it('refuses another key', async () => {
    const other = mailSdkFor(fake, 'SG.another')
    const { code, errors } = await refusalOf(other.send(letterTo('key@mail.example')))
    expect(code).toBe(401)
    expect(errors).toHaveLength(1)
    expect(fake.messagesTo('key@mail.example')).toEqual([])
  })

  it.each([
    ['an address that is none', { to: 'golfer' }, ['personalizations.0.to.0.email']],
    ['one address twice', { cc: 'WRONG@mail.example' }, ['personalizations.0']],
    ['a sender without an address', { from: { name: 'Kittiwake', email: '' } }, ['from.email']],
    ['an empty subject', { subject: '' }, ['subject']],
    [
      'an attachment that is no base64',
      { attachments: [{ content: '{}', filename: 'a' }] },
      ['attachments.0.content'],
    ],
    [
      'an attachment whose type has a character set',
      attached('text/calendar; charset=utf-8; method=REQUEST'),
      ['attachments.0.type'],
    ],
    [
      'several things at once',
      { to: 'golfer', subject: '' },
      ['personalizations.0.to.0.email', 'subject'],
    ],
  ])('refuses %s, and names the fields', async (_what, changes, fields) => {
    const before = fake.messages.length
    const refusal = await refusalOf(mail.send(letterTo('wrong@mail.example', changes)))
    expect(refusal).toMatchObject({ code: 400, fields })
    expect(fake.messages).toHaveLength(before)
  })

  it.each([
    ['nobody to send it to', {}, ['personalizations', 'from.email', 'content']],
    [
      'html before text',
      {
        personalizations: [{ to: [{ email: 'a@mail.example' }], subject: 'Hello' }],
        from: { email: 'post@marram.example' },
        content: [
          { type: 'text/html', value: '<p>a</p>' },
          { type: 'text/plain', value: 'a' },
        ],
      },
      ['content'],
    ],
    [
      'an empty part',
      {
        personalizations: [{ to: [{ email: 'a@mail.example' }], subject: 'Hello' }],
        from: { email: 'post@marram.example' },
        content: [{ type: 'text/plain', value: '' }],
      },
      ['content.0.value'],
    ],
    ['a shape that makes no sense', { personalizations: 'everybody' }, [null]],
    ['no JSON', '{"personalizations":', [null]],
  ])('refuses %s from any client', async (_what, body, fields) => {
    const response = await fetch(`${fake.url}/v3/mail/send`, {
      method: 'POST',
      headers: { authorization: 'Bearer SG.marram', 'content-type': 'application/json' },
      body: typeof body === 'string' ? body : JSON.stringify(body),
    })
    expect(response.status).toBe(400)
    // Every refusal has this shape.
    const { errors } = (await response.json()) as { errors: { field: string | null }[] }
    expect(errors.map(({ field }) => field)).toEqual(fields)
  })

  it('is down when it is told to be, and says nothing was sent', async () => {
    await control(fake, 'fail-next', { status: 503, count: 2 })
    for (const _time of [1, 2]) {
      const { code } = await refusalOf(mail.send(letterTo('down@mail.example')))
      expect(code).toBe(503)
    }
    await mail.send(letterTo('down@mail.example'))
    expect(fake.messagesTo('down@mail.example')).toHaveLength(1)
  })

  it('tells other processes what it has, and forgets it when asked', async () => {
    await mail.send(letterTo('other@mail.example'))
    const listed = await fetch(`${fake.url}/_control/messages?to=other@mail.example`)
    expect(await listed.json()).toMatchObject([{ to: 'other@mail.example' }])
    await control(fake, 'reset')
    expect(fake.messages).toEqual([])
  })
})
