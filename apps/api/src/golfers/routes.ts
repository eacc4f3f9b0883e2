import type { Handlers } from '../platform/http/context'
import { asAcademy, asStaff } from '../platform/http/narrow'
import type { Services } from '../platform/services'
import { enterGolfer, listGolfers } from './for-staff'
import { addMyDependant, readMyGolfers } from './golfers'

export function golferHandlers(services: Services): Handlers {
  return {
    'golfers.mine': (_input, context) => {
      const { academyId, account: person } = asStaff(context)
      return readMyGolfers(services, { academyId, person })
    },
    'golfers.add-dependant': ({ body }, context) => {
      const { academyId, account: person } = asStaff(context)
      return addMyDependant(services, { academyId, person, dependant: body })
    },
    'golfers.list': ({ query }, context) => {
      const { academyId, account, scope } = asStaff(context)
      const reach = { academyId, accountId: account.id, scope: scope ?? 'own' }
      return listGolfers(services, { reach, search: query.search?.trim() ?? '' })
    },
    'golfers.enter': ({ body }, context) =>
      enterGolfer(services, { academyId: asAcademy(context).academyId, wanted: body }),
  }
}
