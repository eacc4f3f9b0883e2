import { scopeOf } from '@marram/contract'
import { sessionReach } from '../clinics/routes'
import type { Handlers } from '../platform/http/context'
import type { Services } from '../platform/services'
import {
  closeRegister,
  markPlace,
  readCard,
  readDay,
  readRegister,
  reopenRegister,
} from './register'

export function registerHandlers(services: Services): Handlers {
  return {
    'register.day': ({ params }, context) =>
      readDay(services, { reach: sessionReach(context), dayLocal: params.date }),
    'register.read': ({ params }, context) =>
      readRegister(services, { reach: sessionReach(context), ...params }),
    'register.mark': ({ params, body }, context) =>
      markPlace(services, { reach: sessionReach(context), ...params, press: body }),
    'register.close': ({ params, body }, context) =>
      closeRegister(services, { reach: sessionReach(context), ...params, ...body }),
    'register.reopen': ({ params, body }, context) =>
      reopenRegister(services, { reach: sessionReach(context), ...params, ...body }),
    'register.card': ({ params }, context) =>
      readCard(services, {
        reach: sessionReach(context),
        mayReadMoney: scopeOf(context.roles, 'ledger:read') !== null,
        ...params,
      }),
  }
}
