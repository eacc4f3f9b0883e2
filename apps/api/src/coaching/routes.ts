import { sessionReach } from '../clinics/routes'
import type { Handlers, RequestContext } from '../platform/http/context'
import { asStaff } from '../platform/http/narrow'
import type { Services } from '../platform/services'
import { readSwing, readSwings, recordSwing, removeSwing } from './coaching'
import { compareSwing } from './compare'
import type { SwingReach } from './reach'
import { changeCoachingSettings, readCoachingSettings } from './settings'
import { readTargets, setSwingTarget } from './targets'

const staffReach = (context: RequestContext): SwingReach => ({
  ...sessionReach(context),
  as: 'staff',
})
const ownReach = (context: RequestContext): SwingReach => ({
  ...sessionReach(context),
  as: 'golfer',
})

export function coachingHandlers(services: Services): Handlers {
  return {
    'swings.record': ({ params, body }, context) =>
      recordSwing(services, { reach: staffReach(context), ...params, swing: body }),
    'swings.of-golfer': ({ params, query }, context) =>
      readSwings(services, { reach: staffReach(context), ...params, query }),
    'swings.read': ({ params }, context) =>
      readSwing(services, { reach: staffReach(context), ...params }),
    'swings.remove': async ({ params }, context) => {
      await removeSwing(services, { reach: staffReach(context), ...params })
      return null
    },
    'swings.compare': ({ params, query }, context) =>
      compareSwing(services, { reach: staffReach(context), ...params, query }),
    'targets.read': ({ params }, context) =>
      readTargets(services, { reach: staffReach(context), ...params }),
    'targets.set': ({ params, body }, context) =>
      setSwingTarget(services, { reach: staffReach(context), ...params, target: body }),

    'swings.mine': ({ params, query }, context) =>
      readSwings(services, { reach: ownReach(context), ...params, query }),
    'swings.read-mine': ({ params }, context) =>
      readSwing(services, { reach: ownReach(context), ...params }),
    'swings.compare-mine': ({ params, query }, context) =>
      compareSwing(services, { reach: ownReach(context), ...params, query }),
    'targets.read-mine': ({ params }, context) =>
      readTargets(services, { reach: ownReach(context), ...params }),

    'coaching-settings.read': (_input, context) =>
      readCoachingSettings(services, asStaff(context).academyId),
    'coaching-settings.change': ({ body }, context) => {
      const { academyId, account } = asStaff(context)
      return changeCoachingSettings(services, { academyId, accountId: account.id, change: body })
    },
  }
}
