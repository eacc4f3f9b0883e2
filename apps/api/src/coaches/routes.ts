import type { Handlers } from '../platform/http/context'
import { asAcademy, asPerson, asStaff } from '../platform/http/narrow'
import type { Services } from '../platform/services'
import { acceptInvitation, addCoach, changeCoach, inviteStaff, readCoaches } from './coaches'

export function coachHandlers(services: Services): Handlers {
  return {
    'coaches.list': (_input, context) => readCoaches(services, asAcademy(context).academyId),
    'coaches.add': ({ body }, context) => {
      const { academyId, account } = asStaff(context)
      return addCoach(services, { academyId, addedBy: account.id, coach: body })
    },
    'coaches.change': ({ params, body }, context) =>
      changeCoach(services, { academyId: asAcademy(context).academyId, ...params, change: body }),
    'invitations.send': ({ body }, context) => {
      const { academyId, account } = asStaff(context)
      return inviteStaff(services, { academyId, invitedBy: account.id, wanted: body })
    },
    'invitations.accept': ({ body }, context) =>
      acceptInvitation(services, { secret: body.token, accountId: asPerson(context).account.id }),
  }
}
