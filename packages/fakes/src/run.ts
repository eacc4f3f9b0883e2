import { join } from 'node:path'
import { startMailFake, startOauthFake, startPaymentsFake } from './fakes'

/** Starts all three stand-ins from the environment, and says in one line where they are. */
const env = process.env
const need = (name: string): string => {
  const value = env[name]
  if (!value) {
    process.stderr.write(`${name} is missing.\n`)
    process.exit(78)
  }
  return value
}
const folder = env['MARRAM_FAKES_STATE_DIR']
const stateFile = (name: string) => (folder ? { stateFile: join(folder, `${name}.json`) } : {})
const port = (name: string) => ({ port: Number(env[name] ?? '0') })

const payments = await startPaymentsFake({
  ...port('MARRAM_FAKES_PAYMENTS_PORT'),
  ...stateFile('payments'),
  secretKey: need('MARRAM_PAYMENTS_SECRET_KEY'),
  webhookSecret: need('MARRAM_PAYMENTS_WEBHOOK_SECRET'),
  webhookUrl: need('MARRAM_FAKES_PAYMENTS_WEBHOOK_URL'),
})
const mail = await startMailFake({
  ...port('MARRAM_FAKES_MAIL_PORT'),
  ...stateFile('mail'),
  apiKey: need('MARRAM_MAIL_API_KEY'),
  webhookUrl: need('MARRAM_FAKES_MAIL_WEBHOOK_URL'),
})
const oauth = await startOauthFake({
  ...port('MARRAM_FAKES_OAUTH_PORT'),
  clientId: need('MARRAM_GOOGLE_CLIENT_ID'),
  clientSecret: need('MARRAM_GOOGLE_CLIENT_SECRET'),
})
process.stdout.write(
  `${JSON.stringify({
    payments: payments.url,
    mail: mail.url,
    oauth: oauth.url,
    mailWebhookPublicKey: mail.webhookPublicKey,
  })}\n`,
)

let isStopping = false
const stop = async () => {
  if (isStopping) return
  isStopping = true
  await Promise.all([payments.close(), mail.close(), oauth.close()])
  process.exit(0)
}
process.on('SIGTERM', () => void stop())
process.on('SIGINT', () => void stop())
if (env['MARRAM_STOP_WITH_PARENT'] === 'yes') {
  process.stdin.on('end', () => void stop())
  process.stdin.resume()
}
