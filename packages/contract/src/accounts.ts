import { z } from 'zod'
import { email, id, line, password, secret, slug } from './fields'
import { ROLES } from './permissions'

export const membershipView = z.object({
  academy: z.object({ slug, name: z.string(), accent: z.string(), accentDusk: z.string() }),
  roles: z.array(z.enum(ROLES)),
})

export const sessionView = z.object({
  /** Sent back in the header `x-marram-token` with every change. */
  token: z.string(),
  account: z
    .object({
      id,
      name: z.string(),
      email: z.string(),
      isVerified: z.boolean(),
      hasPassword: z.boolean(),
    })
    .nullable(),
  memberships: z.array(membershipView),
})

export const accountSchemas = {
  'session.read': { response: sessionView },
  'session.sign-in': {
    body: z.strictObject({ email, password: z.string().min(1).max(200) }),
    response: sessionView,
  },
  'session.sign-out': { response: z.null() },
  'session.sign-out-everywhere': { response: z.null() },
  'accounts.sign-up': {
    body: z.strictObject({ name: line(80), email, password }),
    response: sessionView,
  },
  'accounts.send-verification': { response: z.null() },
  'accounts.verify': {
    body: z.strictObject({ token: secret }),
    response: z.object({ email: z.string() }),
  },
  'accounts.ask-reset': { body: z.strictObject({ email }), response: z.null() },
  'accounts.reset': {
    body: z.strictObject({ token: secret, password }),
    response: z.object({ email: z.string() }),
  },
  'demo.people': {
    response: z.object({
      password: z.string(),
      mailboxUrl: z.string(),
      people: z.array(
        z.object({ name: z.string(), email: z.string(), what: z.string(), academy: z.string() }),
      ),
    }),
  },
} as const
