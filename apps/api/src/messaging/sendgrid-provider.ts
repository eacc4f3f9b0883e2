import { Client } from '@sendgrid/client'
import { MailService } from '@sendgrid/mail'
import type { Config } from '../platform/config'
import type { MailProvider } from './provider'

/** The mail provider, through its own SDK; the only file that knows it. */
export function makeSendgridProvider(config: Config['mail']): MailProvider {
  const own = new Client()
  own.setApiKey(config.apiKey)
  if (config.url) own.setDefaultRequest('baseUrl', `${config.url.replace(/\/$/, '')}/`)
  const service = new MailService()
  service.setClient(own)

  return {
    async send({ to, fromName, subject, text, html, calendar }) {
      const [response] = await service.send({
        to,
        from: { email: config.from, name: fromName },
        subject,
        text,
        html,
        trackingSettings: {
          clickTracking: { enable: false, enableText: false },
          openTracking: { enable: false },
        },
        ...(calendar
          ? {
              attachments: [
                {
                  content: Buffer.from(calendar.text, 'utf8').toString('base64'),
                  filename: 'clinic.ics',
                  // The provider refuses any other parameter beside the method, and adds UTF-8.
                  type: `text/calendar; method=${calendar.method}`,
                  disposition: 'attachment',
                },
              ],
            }
          : {}),
      })
      const id = (response.headers as Record<string, unknown>)['x-message-id']
      return typeof id === 'string' ? id : ''
    },
  }
}
