import { offerOpenedPlaces } from '../enrolments/waitlist'
import type { Handlers } from '../platform/outbox/events'
import type { Services } from '../platform/services'
import { chooseByDefault, owePlacesOfSession } from './called-off'
import { earnSession, followMovedSession, unearnSession } from './earning'
import { lapseHold } from './orders'
import type { PaymentsProvider } from './provider'
import { carryOutRefund } from './refunds'
import { hearProvider } from './webhooks'

/** What money does when something happened. */
export function checkoutListeners(services: Services, provider: PaymentsProvider): Handlers {
  return {
    'session.called-off': (event) => owePlacesOfSession(services, event),
    'session.changed': (event) => followMovedSession(services, event),
    'places.opened': (event) => offerOpenedPlaces(services, event),
    'register.closed': (event) => earnSession(services, event),
    'register.reopened': (event) => unearnSession(services, event),
    'hold.lapsed': (event) => lapseHold(services, provider, event),
    'choice.due': (event) => chooseByDefault(services, event),
    'refund.asked': (event) => carryOutRefund(services, provider, event),
    'payments.told': (event) => hearProvider(services, provider, event),
  }
}
