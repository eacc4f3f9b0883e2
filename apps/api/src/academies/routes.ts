import type { Handlers } from '../platform/http/context'
import { asAcademy, asPerson } from '../platform/http/narrow'
import type { Services } from '../platform/services'
import { listPublishedAcademies } from '../platform/tenancy/look-ups'
import { changeSettings, checkSlug, openAcademy, publishAcademy, readSettings } from './academies'
import { readInvitation, readStaff, removeStaff, withdrawInvitation } from './staff'

export function academyHandlers(services: Services): Handlers {
  return {
    'academies.open': ({ body }, context) =>
      openAcademy(services, { accountId: asPerson(context).account.id, wanted: body }),
    'academies.check-slug': ({ params }) => checkSlug(services, params.slug),
    'academies.published': async () => ({
      academies: await listPublishedAcademies(services.db),
    }),
    'academies.read': (_input, context) => readSettings(services, asAcademy(context).academyId),
    'academies.change': ({ body }, context) =>
      changeSettings(services, { academyId: asAcademy(context).academyId, change: body }),
    'academies.publish': ({ body }, context) =>
      publishAcademy(services, {
        academyId: asAcademy(context).academyId,
        isPublished: body.isPublished,
      }),
    'staff.list': (_input, context) => readStaff(services, asAcademy(context).academyId),
    'staff.remove': async ({ params }, context) => {
      await removeStaff(services, { academyId: asAcademy(context).academyId, ...params })
      return null
    },
    'invitations.withdraw': async ({ params }, context) => {
      await withdrawInvitation(services, { academyId: asAcademy(context).academyId, ...params })
      return null
    },
    'invitations.read': ({ body }) => readInvitation(services, body.token),
  }
}
