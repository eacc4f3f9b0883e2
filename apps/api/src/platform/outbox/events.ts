/**
 * What features tell each other after the fact. An event is written in the transaction that caused
 * it, and carries ids only: whoever hears it reads the truth again.
 */
export interface OutboxEvents {
  'account.link-wanted': { accountId: string; purpose: 'verify' | 'reset' }
  'invitation.made': { academyId: string; invitationId: string }
  'enrolment.confirmed': { academyId: string; enrolmentId: string }
  'enrolment.offered': { academyId: string; enrolmentId: string }
  'enrolment.given-up': { academyId: string; enrolmentId: string; refundMinor: number }
  'session.called-off': { academyId: string; sessionId: string }
  /** Places of a called-off session have ended, and what is owed for them stands. */
  'session.owed': { academyId: string; sessionId: string }
  'session.changed': { academyId: string; sessionId: string }
  /** More places than before may be free in a clinic that golfers wait for. */
  'places.opened': { academyId: string; clinicId: string }
  'register.closed': { academyId: string; sessionId: string; revision: number }
  'register.reopened': { academyId: string; sessionId: string; revision: number }
  'hold.lapsed': { academyId: string; enrolmentId: string }
  'choice.due': { academyId: string; placeId: string }
  'refund.asked': { academyId: string; refundId: string }
  'payments.told': { eventId: string; account: string | null; type: string; objectId: string }
  'mail.told': { eventId: string; type: string; email: string }
}

export type EventName = keyof OutboxEvents

/** Who listens. Each listener has a queue of its own, so that one's trouble holds up no other. */
export const LISTENERS = {
  'account.link-wanted': ['messaging'],
  'invitation.made': ['messaging'],
  'enrolment.confirmed': ['messaging'],
  'enrolment.offered': ['messaging'],
  'enrolment.given-up': ['messaging'],
  'session.called-off': ['checkout'],
  'session.owed': ['messaging'],
  'session.changed': ['checkout', 'messaging'],
  'places.opened': ['checkout'],
  'register.closed': ['checkout'],
  'register.reopened': ['checkout'],
  'hold.lapsed': ['checkout'],
  'choice.due': ['checkout'],
  'refund.asked': ['checkout'],
  'payments.told': ['checkout'],
  'mail.told': ['messaging'],
} as const satisfies Record<EventName, readonly string[]>

/**
 * What the sweep finds due, and by which id. It finds it again for as long as it is due, so that one
 * waiting job for each is enough, and a job that fails is not tried again by itself.
 */
export const SWEPT: { [E in EventName]?: keyof OutboxEvents[E] } = {
  'hold.lapsed': 'enrolmentId',
  'choice.due': 'placeId',
  'refund.asked': 'refundId',
}

export type Listener = 'checkout' | 'messaging'

/** The handlers of one listener, by event. */
export type Handlers = { [E in EventName]?: (payload: OutboxEvents[E]) => Promise<void> }

export const queueOf = (event: EventName, listener: string): string => `${listener}.${event}`

export interface Queue {
  name: string
  isSwept: boolean
}

export const ALL_QUEUES: readonly Queue[] = Object.entries(LISTENERS).flatMap(
  ([event, listeners]) =>
    listeners.map((listener) => ({ name: `${listener}.${event}`, isSwept: event in SWEPT })),
)
