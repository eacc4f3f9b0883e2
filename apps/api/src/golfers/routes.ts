import { scopeOf } from '@marram/contract'
import type { Handlers, RequestContext } from '../platform/http/context'
import { asAcademy, asStaff } from '../platform/http/narrow'
import type { Services } from '../platform/services'
import { enterGolfer, listGolfers, type Reach } from './for-staff'
import { addMyDependant, readMyGolfers } from './golfers'

/** Which golfers a member of staff may reach, and what of them, from their permissions. */
export function golferReach(context: RequestContext): Reach {
  const { academyId, account, roles, scope } = asStaff(context)
  const minors = scopeOf(roles, 'minors:read')
  return { academyId, accountId: account.id, scope: scope ?? 'own', minors }
}

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
      const search = query.search?.trim() ?? ''
      return listGolfers(services, { reach: golferReach(context), search })
    },
    'golfers.enter': ({ body }, context) =>
      enterGolfer(services, { academyId: asAcademy(context).academyId, wanted: body }),
  }
}
