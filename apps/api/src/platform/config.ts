import { z } from 'zod'

const url = z.string().regex(/^https?:\/\/\S+$/)
const databaseUrl = z.string().startsWith('postgres://')

const shape = z.object({
  /** `demo` runs on loopback with the local stand-ins and shows demo people at sign-in. */
  MARRAM_MODE: z.enum(['demo', 'test', 'production']),
  MARRAM_PORT: z.coerce.number().int().min(0).max(65_535).default(4310),
  MARRAM_PUBLIC_URL: url,
  MARRAM_SECRET: z.string().min(32),
  MARRAM_DATABASE_URL: databaseUrl,
  MARRAM_DISPATCH_DATABASE_URL: databaseUrl,
  MARRAM_DATABASE_POOL: z.coerce.number().int().min(1).max(100).default(10),
  MARRAM_WEB_FOLDER: z.string().default('dist/web'),
  /** Sign-ins, sign-ups and resets from one address in ten minutes. */
  MARRAM_ATTEMPTS_PER_ADDRESS: z.coerce.number().int().min(1).default(60),
  MARRAM_LOG_LEVEL: z.enum(['silent', 'error', 'warn', 'info', 'debug']).default('info'),
  MARRAM_PAYMENTS_SECRET_KEY: z.string().min(8),
  MARRAM_PAYMENTS_WEBHOOK_SECRET: z.string().min(8),
  /** Only where a stand-in answers instead of the provider. */
  MARRAM_PAYMENTS_URL: url.optional(),
  MARRAM_PLATFORM_FEE_BASIS_POINTS: z.coerce.number().int().min(0).max(2_000).default(100),
  MARRAM_MAIL_API_KEY: z.string().min(8),
  MARRAM_MAIL_FROM: z.email(),
  MARRAM_MAIL_URL: url.optional(),
  /** What is told of mail (bounces, complaints) is signed for it; production needs it. */
  MARRAM_MAIL_WEBHOOK_PUBLIC_KEY: z.string().min(1).optional(),
  MARRAM_GOOGLE_CLIENT_ID: z.string().min(1),
  MARRAM_GOOGLE_CLIENT_SECRET: z.string().min(1),
  MARRAM_GOOGLE_URL: url.optional(),
})

export interface Config {
  mode: 'demo' | 'test' | 'production'
  port: number
  publicUrl: string
  secret: string
  logLevel: string
  webFolder: string
  attemptsPerAddress: number
  database: { url: string; dispatchUrl: string; poolSize: number }
  payments: {
    secretKey: string
    webhookSecret: string
    url: string | undefined
    platformFeeBasisPoints: number
  }
  mail: {
    apiKey: string
    from: string
    url: string | undefined
    webhookPublicKey: string | undefined
  }
  google: { clientId: string; clientSecret: string; url: string | undefined }
}

/**
 * Reads the configuration once, at boot. Throws one sentence that names every missing or wrong
 * variable. Production refuses stand-ins and test keys; the other modes refuse live keys.
 */
export function readConfig(env: Readonly<Record<string, string | undefined>>): Config {
  const read = shape.safeParse(env)
  if (!read.success) {
    const names = [...new Set(read.error.issues.map((issue) => issue.path.join('.')))]
    throw new Error(`The configuration is missing or wrong in: ${names.join(', ')}.`)
  }
  const value = read.data
  const config: Config = {
    mode: value.MARRAM_MODE,
    port: value.MARRAM_PORT,
    publicUrl: value.MARRAM_PUBLIC_URL.replace(/\/$/, ''),
    secret: value.MARRAM_SECRET,
    logLevel: value.MARRAM_LOG_LEVEL,
    webFolder: value.MARRAM_WEB_FOLDER,
    attemptsPerAddress: value.MARRAM_ATTEMPTS_PER_ADDRESS,
    database: {
      url: value.MARRAM_DATABASE_URL,
      dispatchUrl: value.MARRAM_DISPATCH_DATABASE_URL,
      poolSize: value.MARRAM_DATABASE_POOL,
    },
    payments: {
      secretKey: value.MARRAM_PAYMENTS_SECRET_KEY,
      webhookSecret: value.MARRAM_PAYMENTS_WEBHOOK_SECRET,
      url: value.MARRAM_PAYMENTS_URL,
      platformFeeBasisPoints: value.MARRAM_PLATFORM_FEE_BASIS_POINTS,
    },
    mail: {
      apiKey: value.MARRAM_MAIL_API_KEY,
      from: value.MARRAM_MAIL_FROM,
      url: value.MARRAM_MAIL_URL,
      webhookPublicKey: value.MARRAM_MAIL_WEBHOOK_PUBLIC_KEY,
    },
    google: {
      clientId: value.MARRAM_GOOGLE_CLIENT_ID,
      clientSecret: value.MARRAM_GOOGLE_CLIENT_SECRET,
      url: value.MARRAM_GOOGLE_URL,
    },
  }
  refuseMixing(config)
  return config
}

function refuseMixing({ mode, payments, mail, google, publicUrl }: Config): void {
  const isLive = payments.secretKey.startsWith('sk_live_')
  if (mode === 'production') {
    if (payments.url || mail.url || google.url) {
      throw new Error(
        'Production refuses local stand-ins: remove every MARRAM_*_URL of a provider.',
      )
    }
    if (!isLive) throw new Error('Production needs a live payments key.')
    if (!mail.webhookPublicKey) {
      // Without it every report of a bounce is refused, and mail goes on to where it bounced.
      throw new Error('Production needs MARRAM_MAIL_WEBHOOK_PUBLIC_KEY, to know who tells of mail.')
    }
    if (!publicUrl.startsWith('https://')) throw new Error('Production needs an https public URL.')
    return
  }
  if (isLive) throw new Error(`The ${mode} mode refuses a live payments key.`)
}
