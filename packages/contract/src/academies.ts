import { z } from 'zod'
import { colour, currency, email, id, instant, line, prose, secret, slug, zone } from './fields'
import { ROLES } from './permissions'

const STAFF_ROLES = ['owner', 'desk', 'coach', 'bookkeeper'] as const

/** With at least this much notice, this share of the price comes back (basis points). */
export const refundTier = z.strictObject({
  noticeHours: z
    .int()
    .min(0)
    .max(24 * 60),
  refundBasisPoints: z.int().min(0).max(10_000),
})

export const academySettings = z.strictObject({
  name: line(80),
  place: line(80),
  /** One sentence or two under the name on the public page. */
  lead: prose(240),
  address: prose(200),
  zone,
  locale: z.enum(['en-IE', 'en-GB', 'en-US', 'en-CA', 'en-AU', 'en-NZ']),
  accent: colour,
  accentDusk: colour,
  taxMode: z.enum(['included', 'added']),
  taxName: line(20),
  taxBasisPoints: z.int().min(0).max(5_000),
  refundTiers: z.array(refundTier).min(1).max(6),
  waiver: prose(2_000),
  safeguarding: prose(2_000),
  holdMinutes: z.int().min(5).max(60),
  offerHours: z.int().min(1).max(72),
  duskKind: z.enum(['sunset', 'civil']),
  owedDefault: z.enum(['credit', 'money']),
  canPayAtDesk: z.boolean(),
})

export const academyView = academySettings.extend({
  slug,
  currency,
  publishedAt: instant.nullable(),
  paymentsState: z.enum(['none', 'started', 'ready']),
})

export const academySchemas = {
  'academies.open': {
    body: z.strictObject({
      name: line(80),
      place: line(80),
      slug,
      zone,
      currency,
      taxMode: z.enum(['included', 'added']),
      taxName: line(20).optional(),
      taxBasisPoints: z.int().min(0).max(5_000).optional(),
    }),
    response: academyView,
  },
  'academies.check-slug': {
    params: z.strictObject({ slug: z.string().max(80) }),
    response: z.object({ isFree: z.boolean(), suggestion: z.string() }),
  },
  'academies.published': {
    response: z.object({
      academies: z.array(
        z.object({ slug, name: z.string(), place: z.string(), accent: z.string() }),
      ),
    }),
  },
  'academies.read': { response: academyView },
  'academies.change': { body: academySettings.partial(), response: academyView },
  'academies.publish': {
    body: z.strictObject({ isPublished: z.boolean() }),
    response: academyView,
  },
  'staff.list': {
    response: z.object({
      staff: z.array(
        z.object({
          accountId: id,
          name: z.string(),
          email: z.string(),
          roles: z.array(z.enum(ROLES)),
        }),
      ),
      invitations: z.array(
        z.object({ id, email: z.string(), role: z.enum(STAFF_ROLES), expiresAt: instant }),
      ),
    }),
  },
  'staff.remove': {
    params: z.strictObject({ accountId: id, role: z.enum(STAFF_ROLES) }),
    response: z.null(),
  },
  'invitations.send': {
    body: z.strictObject({ email, role: z.enum(STAFF_ROLES), coachId: id.optional() }),
    response: z.object({ id }),
  },
  'invitations.withdraw': {
    params: z.strictObject({ invitationId: id }),
    response: z.null(),
  },
  'invitations.read': {
    body: z.strictObject({ token: secret }),
    response: z.object({ academyName: z.string(), role: z.enum(STAFF_ROLES), email: z.string() }),
  },
  'invitations.accept': {
    body: z.strictObject({ token: secret }),
    response: z.object({ slug, role: z.enum(STAFF_ROLES) }),
  },
} as const
