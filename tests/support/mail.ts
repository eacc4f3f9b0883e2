import { Client } from '@sendgrid/client'
import { MailService, type MailDataRequired } from '@sendgrid/mail'
import { startMailFake, type MailFake, type MailFakeOptions } from '@marram/fakes'

export const MAIL_KEY = 'SG.marram'

/** The vendor's own SDK, pointed at the stand-in. */
export function mailSdkFor(fake: MailFake, key = MAIL_KEY): MailService {
  const client = new Client()
  // The key comes first: it sets the vendor's own address.
  client.setApiKey(key)
  client.setDefaultRequest('baseUrl', `${fake.url}/`)
  const service = new MailService()
  service.setClient(client)
  return service
}

export async function startMail(
  options: Partial<MailFakeOptions> = {},
): Promise<{ fake: MailFake; mail: MailService }> {
  const fake = await startMailFake({ apiKey: MAIL_KEY, ...options })
  return { fake, mail: mailSdkFor(fake) }
}

/** A letter as the product writes it, with the test's own changes. */
export function letterTo(to: string, changes: Partial<MailDataRequired> = {}) {
  return {
    to,
    from: { email: 'post@marram.example', name: 'Kittiwake Links Academy' },
    subject: 'Your place: Tuesday wedges',
    text: 'See you on Tuesday. http://127.0.0.1:9/kittiwake',
    html: '<html><head></head><body><p>See you on <b>Tuesday</b>.</p></body></html>',
    ...changes,
    // The SDK's type wants one of text, html or content; the letter has the first two.
  } as MailDataRequired
}
