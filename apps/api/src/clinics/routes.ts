import { scopeOf } from '@marram/contract'
import type { Handlers, RequestContext } from '../platform/http/context'
import { asAcademy, asStaff } from '../platform/http/narrow'
import { invariant } from '../platform/invariant'
import type { Services } from '../platform/services'
import {
  changeClinic,
  draftClinic,
  publishClinic,
  readClinic,
  readClinics,
  throwClinicAway,
} from './clinics'
import { readAcademyPage, readClinicOnPage, type PageReader } from './page'
import { previewClinic } from './preview'
import { callOffSession, changeSession, readBoard, type SessionReach } from './sessions'

/** What a member of staff may reach of the sessions, from the route's permission. */
export function sessionReach(context: RequestContext): SessionReach {
  const { academyId, account, scope } = asStaff(context)
  return { academyId, accountId: account.id, scope: scope ?? 'own' }
}

export function clinicHandlers(services: Services): Handlers {
  const academyIdOf = (context: RequestContext) => asAcademy(context).academyId

  const readerOf = ({ academySlug: slug, roles }: RequestContext): PageReader => {
    invariant(slug, 'a public page has an address')
    return { slug, maySeeUnpublished: scopeOf(roles, 'academy:read') !== null }
  }

  return {
    'page.read': (_input, context) => readAcademyPage(services, readerOf(context)),
    'page.clinic': ({ params }, context) =>
      readClinicOnPage(services, { ...readerOf(context), clinic: params.clinic }),
    'clinics.preview': ({ body }, context) =>
      previewClinic(services, { academyId: academyIdOf(context), wanted: body }),
    'clinics.list': (_input, context) => readClinics(services, academyIdOf(context)),
    'clinics.draft': ({ body }, context) =>
      draftClinic(services, { academyId: academyIdOf(context), wanted: body }),
    'clinics.read': ({ params }, context) =>
      readClinic(services, { academyId: academyIdOf(context), ...params }),
    'clinics.change': ({ params, body }, context) =>
      changeClinic(services, { academyId: academyIdOf(context), ...params, wanted: body }),
    'clinics.publish': ({ params, body }, context) =>
      publishClinic(services, { academyId: academyIdOf(context), ...params, ...body }),
    'clinics.throw-away': async ({ params }, context) => {
      await throwClinicAway(services, { academyId: academyIdOf(context), ...params })
      return null
    },
    'sessions.list': ({ query }, context) =>
      readBoard(services, { reach: sessionReach(context), ...query }),
    'sessions.change': ({ params, body }, context) =>
      changeSession(services, { reach: sessionReach(context), ...params, change: body }),
    'sessions.call-off': ({ params, body }, context) =>
      callOffSession(services, { reach: sessionReach(context), ...params, ...body }),
  }
}
