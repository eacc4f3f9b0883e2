import type { Handlers } from '../platform/outbox/events'
import type { Services } from '../platform/services'
import type { Messenger } from './messaging'
import { silence } from './queries'

/** What people are told when something happened. */
export function messagingListeners(services: Services, messenger: Messenger): Handlers {
  return {
    'account.link-wanted': (event) => messenger.sendAccountLink(event),
    'invitation.made': (event) => messenger.sendInvitation(event),
    'enrolment.confirmed': (event) => messenger.tellConfirmed(event),
    'enrolment.offered': (event) => messenger.tellOffered(event),
    'enrolment.given-up': (event) => messenger.tellGivenUp(event),
    'session.owed': (event) => messenger.tellCalledOff(event),
    'session.changed': (event) => messenger.tellChanged(event),
    'mail.told': ({ email, type }) =>
      silence(services.db, { email, reason: type, silencedAt: services.clock.now() }),
  }
}
