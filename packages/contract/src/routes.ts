import type { Permission } from './permissions'

/** `public`: nobody need sign in. `account`: any signed-in person. Otherwise a permission. */
export type Access = 'public' | 'account' | Permission

export interface RouteSpec {
  method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE'
  path: string
  access: Access
}

const TENANT = '/api/academies/:academy'

/**
 * Every API route: its method, its path and who may call it. Holds no schema, so that the web can
 * import it without their weight; `schemas.ts` gives each route its shapes.
 */
export const ROUTES = {
  'session.read': { method: 'GET', path: '/api/session', access: 'public' },
  'session.sign-in': { method: 'POST', path: '/api/session', access: 'public' },
  'session.sign-out': { method: 'DELETE', path: '/api/session', access: 'account' },
  'session.sign-out-everywhere': { method: 'DELETE', path: '/api/sessions', access: 'account' },
  'accounts.sign-up': { method: 'POST', path: '/api/accounts', access: 'public' },
  'accounts.send-verification': {
    method: 'POST',
    path: '/api/verification-mails',
    access: 'account',
  },
  'accounts.verify': { method: 'POST', path: '/api/verifications', access: 'account' },
  'accounts.ask-reset': { method: 'POST', path: '/api/password-reset-mails', access: 'public' },
  'accounts.reset': { method: 'POST', path: '/api/password-resets', access: 'public' },
  'demo.people': { method: 'GET', path: '/api/demo-people', access: 'public' },

  'academies.open': { method: 'POST', path: '/api/academies', access: 'account' },
  'academies.check-slug': {
    method: 'GET',
    path: '/api/academy-addresses/:slug',
    access: 'account',
  },
  'academies.published': { method: 'GET', path: '/api/published-academies', access: 'public' },
  'academies.read': { method: 'GET', path: TENANT, access: 'academy:read' },
  'academies.change': { method: 'PATCH', path: TENANT, access: 'academy:change' },
  'academies.publish': { method: 'PUT', path: `${TENANT}/publication`, access: 'academy:change' },
  'staff.list': { method: 'GET', path: `${TENANT}/staff`, access: 'staff:manage' },
  'staff.remove': {
    method: 'DELETE',
    path: `${TENANT}/staff/:accountId/:role`,
    access: 'staff:manage',
  },
  'invitations.send': { method: 'POST', path: `${TENANT}/invitations`, access: 'staff:manage' },
  'invitations.withdraw': {
    method: 'DELETE',
    path: `${TENANT}/invitations/:invitationId`,
    access: 'staff:manage',
  },
  'invitations.read': { method: 'POST', path: '/api/invitation-look-ups', access: 'public' },
  'invitations.accept': { method: 'POST', path: '/api/invitation-acceptances', access: 'account' },

  'venues.list': { method: 'GET', path: `${TENANT}/venues`, access: 'venues:read' },
  'venues.add': { method: 'POST', path: `${TENANT}/venues`, access: 'venues:change' },
  'venues.change': { method: 'PATCH', path: `${TENANT}/venues/:venueId`, access: 'venues:change' },
  'areas.add': { method: 'POST', path: `${TENANT}/venues/:venueId/areas`, access: 'venues:change' },
  'areas.change': { method: 'PATCH', path: `${TENANT}/areas/:areaId`, access: 'venues:change' },
  'coaches.list': { method: 'GET', path: `${TENANT}/coaches`, access: 'coaches:read' },
  'coaches.add': { method: 'POST', path: `${TENANT}/coaches`, access: 'coaches:change' },
  'coaches.change': {
    method: 'PATCH',
    path: `${TENANT}/coaches/:coachId`,
    access: 'coaches:change',
  },

  'golfers.mine': { method: 'GET', path: `${TENANT}/my/golfers`, access: 'account' },
  'golfers.add-dependant': { method: 'POST', path: `${TENANT}/my/golfers`, access: 'account' },
  'golfers.list': { method: 'GET', path: `${TENANT}/golfers`, access: 'golfers:read' },
  'golfers.enter': { method: 'POST', path: `${TENANT}/golfers`, access: 'golfers:change' },
  'golfers.read': { method: 'GET', path: `${TENANT}/golfers/:golferId`, access: 'golfers:read' },
  'golfers.change': {
    method: 'PATCH',
    path: `${TENANT}/golfers/:golferId`,
    access: 'golfers:change',
  },

  'page.read': { method: 'GET', path: `${TENANT}/page`, access: 'public' },
  'page.clinic': { method: 'GET', path: `${TENANT}/page/clinics/:clinic`, access: 'public' },
  'clinics.preview': { method: 'POST', path: `${TENANT}/clinic-previews`, access: 'clinics:write' },
  'clinics.list': { method: 'GET', path: `${TENANT}/clinics`, access: 'clinics:titles' },
  'clinics.draft': { method: 'POST', path: `${TENANT}/clinics`, access: 'clinics:write' },
  'clinics.read': { method: 'GET', path: `${TENANT}/clinics/:clinicId`, access: 'clinics:read' },
  'clinics.change': { method: 'PUT', path: `${TENANT}/clinics/:clinicId`, access: 'clinics:write' },
  'clinics.publish': {
    method: 'PUT',
    path: `${TENANT}/clinics/:clinicId/publication`,
    access: 'clinics:write',
  },
  'clinics.throw-away': {
    method: 'DELETE',
    path: `${TENANT}/clinics/:clinicId`,
    access: 'clinics:write',
  },
  'sessions.list': { method: 'GET', path: `${TENANT}/sessions`, access: 'clinics:read' },
  'sessions.change': {
    method: 'PATCH',
    path: `${TENANT}/sessions/:sessionId`,
    access: 'sessions:change',
  },
  'sessions.call-off': {
    method: 'POST',
    path: `${TENANT}/sessions/:sessionId/calling-off`,
    access: 'sessions:change',
  },

  'enrolments.mine': { method: 'GET', path: `${TENANT}/my/enrolments`, access: 'account' },
  'enrolments.hold': { method: 'POST', path: `${TENANT}/my/enrolments`, access: 'account' },
  'enrolments.read': {
    method: 'GET',
    path: `${TENANT}/my/enrolments/:enrolmentId`,
    access: 'account',
  },
  'enrolments.release': {
    method: 'DELETE',
    path: `${TENANT}/my/enrolments/:enrolmentId/hold`,
    access: 'account',
  },
  'enrolments.give': { method: 'POST', path: `${TENANT}/enrolments`, access: 'places:change' },
  'enrolments.of-clinic': {
    method: 'GET',
    path: `${TENANT}/clinics/:clinicId/enrolments`,
    access: 'places:read',
  },
  'enrolments.of-golfer': {
    method: 'GET',
    path: `${TENANT}/golfers/:golferId/enrolments`,
    access: 'places:change',
  },
  'waitlist.join': { method: 'POST', path: `${TENANT}/my/waitlist`, access: 'account' },
  'waitlist.leave': { method: 'DELETE', path: `${TENANT}/my/waitlist/:entryId`, access: 'account' },

  'checkout.start': {
    method: 'POST',
    path: `${TENANT}/my/enrolments/:enrolmentId/checkout`,
    access: 'account',
  },
  'checkout.at-desk': {
    method: 'POST',
    path: `${TENANT}/my/enrolments/:enrolmentId/desk-order`,
    access: 'account',
  },
  'checkout.quote-giving-up': {
    method: 'GET',
    path: `${TENANT}/my/enrolments/:enrolmentId/giving-up`,
    access: 'account',
  },
  'checkout.give-up': {
    method: 'POST',
    path: `${TENANT}/my/enrolments/:enrolmentId/giving-up`,
    access: 'account',
  },
  'checkout.quote-giving-up-for': {
    method: 'GET',
    path: `${TENANT}/enrolments/:enrolmentId/giving-up`,
    access: 'places:change',
  },
  'checkout.give-up-for': {
    method: 'POST',
    path: `${TENANT}/enrolments/:enrolmentId/giving-up`,
    access: 'places:change',
  },
  'checkout.choose': {
    method: 'PUT',
    path: `${TENANT}/my/owed-places/:placeId/choice`,
    access: 'account',
  },
  'checkout.take-cash': {
    method: 'POST',
    path: `${TENANT}/enrolments/:enrolmentId/cash`,
    access: 'orders:take',
  },
  'payments.read': { method: 'GET', path: `${TENANT}/payments-account`, access: 'academy:read' },
  'payments.connect': {
    method: 'POST',
    path: `${TENANT}/payments-account`,
    access: 'payments:connect',
  },

  'register.day': { method: 'GET', path: `${TENANT}/days/:date`, access: 'register:take' },
  'register.read': {
    method: 'GET',
    path: `${TENANT}/sessions/:sessionId/register`,
    access: 'register:take',
  },
  'register.mark': {
    method: 'PUT',
    path: `${TENANT}/sessions/:sessionId/marks/:placeId`,
    access: 'register:take',
  },
  'register.close': {
    method: 'POST',
    path: `${TENANT}/sessions/:sessionId/register/closing`,
    access: 'register:take',
  },
  'register.reopen': {
    method: 'POST',
    path: `${TENANT}/sessions/:sessionId/register/reopening`,
    access: 'register:take',
  },
  'register.card': {
    method: 'GET',
    path: `${TENANT}/clinics/:clinicId/card`,
    access: 'places:read',
  },

  'swings.record': {
    method: 'POST',
    path: `${TENANT}/golfers/:golferId/swings`,
    access: 'swings:record',
  },
  'swings.of-golfer': {
    method: 'GET',
    path: `${TENANT}/golfers/:golferId/swings`,
    access: 'swings:record',
  },
  'swings.read': { method: 'GET', path: `${TENANT}/swings/:swingId`, access: 'swings:record' },
  'swings.remove': { method: 'DELETE', path: `${TENANT}/swings/:swingId`, access: 'swings:record' },
  'swings.compare': {
    method: 'GET',
    path: `${TENANT}/swings/:swingId/comparison`,
    access: 'swings:record',
  },
  'swings.mine': {
    method: 'GET',
    path: `${TENANT}/my/golfers/:golferId/swings`,
    access: 'account',
  },
  'swings.read-mine': { method: 'GET', path: `${TENANT}/my/swings/:swingId`, access: 'account' },
  'swings.compare-mine': {
    method: 'GET',
    path: `${TENANT}/my/swings/:swingId/comparison`,
    access: 'account',
  },
  'targets.read': {
    method: 'GET',
    path: `${TENANT}/golfers/:golferId/swing-targets`,
    access: 'swings:record',
  },
  'targets.read-mine': {
    method: 'GET',
    path: `${TENANT}/my/golfers/:golferId/swing-targets`,
    access: 'account',
  },
  'targets.set': {
    method: 'PUT',
    path: `${TENANT}/golfers/:golferId/swing-targets`,
    access: 'swings:record',
  },
  'coaching-settings.read': {
    method: 'GET',
    path: `${TENANT}/coaching-settings`,
    access: 'swings:record',
  },
  'coaching-settings.change': {
    method: 'PATCH',
    path: `${TENANT}/coaching-settings`,
    access: 'academy:change',
  },

  'ledger.card': { method: 'GET', path: `${TENANT}/money/:year`, access: 'ledger:read' },
  'ledger.transfers': { method: 'GET', path: `${TENANT}/transfers`, access: 'ledger:read' },
  'ledger.export': { method: 'GET', path: `${TENANT}/entries.csv`, access: 'ledger:read' },
} as const satisfies Record<string, RouteSpec>

export type RouteKey = keyof typeof ROUTES

/** The path of a route with its parameters filled in and encoded. */
export function pathOf(key: RouteKey, params: Readonly<Record<string, string>> = {}): string {
  return ROUTES[key].path.replace(/:(\w+)/g, (_, name: string) => {
    const value = params[name]
    if (value === undefined) throw new Error(`The path of ${key} misses "${name}".`)
    return encodeURIComponent(value)
  })
}

export { PERMISSIONS, ROLES, scopeOf } from './permissions'
export type { Permission, Role, Scope } from './permissions'
export { PROBLEM_STATUS } from './problems'
export type { ProblemCode, ProblemDocument } from './problems'
