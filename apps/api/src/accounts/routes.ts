import type { Answer, Role } from '@marram/contract'
import type passport from 'passport'
import { countAttempt } from '../platform/attempts'
import type { Handlers, RequestContext } from '../platform/http/context'
import { asPerson } from '../platform/http/narrow'
import { readCaller } from '../platform/http/caller'
import type { Services } from '../platform/services'
import { listMembershipsOf, type Membership } from '../platform/tenancy/look-ups'
import {
  askReset,
  askVerification,
  resetPassword,
  signOutEverywhere,
  signUp,
  verifyEmail,
} from './accounts'
import { authenticateLocally } from './strategies'

export function accountHandlers(
  services: Services,
  authenticator: passport.Authenticator,
): Handlers {
  const limited = (context: RequestContext, what: string) =>
    countAttempt(services, {
      subject: `${what} from ${context.remoteAddress}`,
      limit: services.config.attemptsPerAddress,
    })
  const view = (context: RequestContext) => viewSession(services, context)

  return {
    'session.read': (_input, context) => view(context),
    'session.sign-in': async (_input, context) => {
      await limited(context, 'sign-in')
      await context.signIn(await authenticateLocally(authenticator, context.http.request))
      return view(context)
    },
    'session.sign-out': async (_input, context) => {
      await context.signOut()
      return null
    },
    'session.sign-out-everywhere': async (_input, context) => {
      await signOutEverywhere(services, asPerson(context).account.id)
      await context.signOut()
      return null
    },
    'accounts.sign-up': async ({ body }, context) => {
      await limited(context, 'sign-up')
      await context.signIn(await signUp(services, body))
      return view(context)
    },
    'accounts.send-verification': async (_input, context) => {
      await limited(context, 'verification')
      await askVerification(services, asPerson(context).account.id)
      return null
    },
    'accounts.verify': async ({ body }, context) => {
      await limited(context, 'link')
      return verifyEmail(services, {
        secret: body.token,
        accountId: asPerson(context).account.id,
      })
    },
    'accounts.ask-reset': async ({ body }, context) => {
      await limited(context, 'reset')
      await askReset(services, body.email)
      return null
    },
    'accounts.reset': async ({ body }, context) => {
      await limited(context, 'link')
      const { email, accountId } = await resetPassword(services, {
        secret: body.token,
        password: body.password,
      })
      await context.signIn(accountId)
      return { email }
    },
  }
}

async function viewSession(
  services: Services,
  context: RequestContext,
): Promise<Answer<'session.read'>> {
  // Asked anew: the request may have signed somebody in since it came.
  const { account } = await readCaller(services, context.http.request, null)
  const memberships = account ? await listMembershipsOf(services.db, account.id) : []
  return { token: context.token(), account, memberships: gather(memberships) }
}

function gather(rows: Membership[]): Answer<'session.read'>['memberships'] {
  const byAcademy = new Map<string, Answer<'session.read'>['memberships'][number]>()
  for (const { role, ...academy } of rows) {
    const roles: Role[] = byAcademy.get(academy.slug)?.roles ?? []
    byAcademy.set(academy.slug, { academy, roles: [...roles, role] })
  }
  return [...byAcademy.values()]
}
