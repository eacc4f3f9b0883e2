import { join } from 'node:path'
import { startMailFake, startOauthFake, startPaymentsFake } from './fakes'
import { UnsafeError } from './safety'

/** What a process ends with that was configured wrongly. */
const EXIT_CONFIG = 78
const env = process.env

function giveUp(sentence: string): never {
  process.stderr.write(`${sentence}\n`)
  process.exit(EXIT_CONFIG)
}

const need = (name: string): string => env[name] || giveUp(`${name} is missing.`)
const port = (name: string) => ({ port: Number(env[name] ?? '0') })
const stateFile = (name: string) => {
  const folder = env['MARRAM_FAKES_STATE_DIR']
  return folder ? { stateFile: join(folder, `${name}.json`) } : {}
}

/** Starts all three stand-ins from the environment. */
async function startAll() {
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
  return { payments, mail, oauth }
}

const { payments, mail, oauth } = await startAll().catch((error: unknown) => {
  if (error instanceof UnsafeError) giveUp(error.message)
  throw error
})
// The start command reads this line to know where they are.
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
