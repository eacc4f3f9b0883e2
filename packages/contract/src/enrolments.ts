import { z } from 'zod'
import { amountMinor, id, instant, signedMinor, slug } from './fields'
import { dependantFields, handicap } from './golfers'

export const placeView = z.object({
  id,
  sessionId: id,
  number: z.int(),
  startsAt: instant,
  endsAt: instant,
  state: z.enum(['held', 'confirmed', 'cancelled']),
  isCalledOff: z.boolean(),
  /** What the academy owes for a place called off, and until when the golfer may choose. */
  owed: z
    .object({
      amountMinor,
      choice: z.enum(['credit', 'money']).nullable(),
      chooseBy: instant,
      isSettled: z.boolean(),
    })
    .nullable(),
  mark: z.enum(['present', 'late', 'absent', 'excused']).nullable(),
  areas: z.array(z.string()),
})

export const enrolmentView = z.object({
  id,
  kind: z.enum(['run', 'session']),
  state: z.enum(['held', 'confirmed', 'cancelled']),
  /** Why a cancelled one ended. */
  endedBecause: z.enum(['lapsed', 'given-up', 'called-off', 'let-go']).nullable(),
  isOffer: z.boolean(),
  heldUntil: instant.nullable(),
  clinic: z.object({
    id,
    slug,
    title: z.string(),
    zone: z.string(),
    bring: z.string(),
    venueName: z.string(),
  }),
  golfer: z.object({ id, name: z.string(), isMe: z.boolean() }),
  netMinor: amountMinor,
  taxMinor: amountMinor,
  totalMinor: amountMinor,
  payMode: z.enum(['card', 'desk', 'free']),
  /** How payment stands: nothing yet, begun, said no to, in, or promised at the desk. */
  payment: z.enum(['none', 'open', 'declined', 'paid', 'at-desk']),
  /** What is still to be paid at the desk. */
  owedMinor: amountMinor,
  places: z.array(placeView),
})

export const waitlistView = z.object({
  id,
  clinic: z.object({ slug, title: z.string() }),
  sessionStartsAt: instant.nullable(),
  golferName: z.string(),
  /** 1 is next. */
  position: z.int(),
  state: z.enum(['waiting', 'offered']),
  enrolmentId: id.nullable(),
  offeredUntil: instant.nullable(),
})

export const giveUpQuote = z.object({
  /** What was paid for the places that would be given up, tax in it. */
  paidMinor: amountMinor,
  refundMinor: amountMinor,
  refundBasisPoints: z.int(),
  /** "More than 48 hours before: all your money back." */
  sentence: z.string(),
  places: z.int(),
  comesBackAs: z.enum(['card', 'cash', 'nothing']),
})

const enrolmentParams = z.strictObject({ enrolmentId: id })

/** What is taken and for whom; a new golfer is made in the same step. */
const what = {
  clinicId: id,
  /** Left out for the whole run (what remains of it). */
  sessionId: id.optional(),
}

export const enrolmentSchemas = {
  'enrolments.mine': {
    response: z.object({
      enrolments: z.array(enrolmentView),
      waitlist: z.array(waitlistView),
      creditMinor: signedMinor,
    }),
  },
  'enrolments.hold': {
    body: z.strictObject({
      ...what,
      for: z.discriminatedUnion('kind', [
        z.strictObject({ kind: z.literal('me'), handicap: handicap.nullable().optional() }),
        z.strictObject({ kind: z.literal('golfer'), golferId: id }),
        z.strictObject({ kind: z.literal('new'), dependant: dependantFields }),
      ]),
      hasAcceptedWaiver: z.literal(true, 'Please read and accept the terms first.'),
    }),
    response: enrolmentView,
  },
  'enrolments.read': { params: enrolmentParams, response: enrolmentView },
  'enrolments.release': { params: enrolmentParams, response: z.null() },
  'enrolments.give': {
    body: z.strictObject({
      ...what,
      golferId: id,
      /** Staff may give a place to a golfer whose handicap or age does not fit. */
      isException: z.boolean(),
    }),
    response: enrolmentView,
  },
  'enrolments.of-clinic': {
    params: z.strictObject({ clinicId: id }),
    response: z.object({
      enrolments: z.array(enrolmentView),
      waitlist: z.array(waitlistView),
    }),
  },
  'enrolments.of-golfer': {
    params: z.strictObject({ golferId: id }),
    response: z.object({ enrolments: z.array(enrolmentView) }),
  },
  'waitlist.join': {
    body: z.strictObject({
      ...what,
      /** Left out for oneself. */
      golferId: id.optional(),
      handicap: handicap.nullable().optional(),
    }),
    response: waitlistView,
  },
  'waitlist.leave': { params: z.strictObject({ entryId: id }), response: z.null() },
} as const

export const checkoutSchemas = {
  'checkout.start': {
    params: enrolmentParams,
    response: z.object({ url: z.string() }),
  },
  'checkout.at-desk': { params: enrolmentParams, response: enrolmentView },
  'checkout.quote-giving-up': { params: enrolmentParams, response: giveUpQuote },
  'checkout.give-up': {
    params: enrolmentParams,
    body: z.strictObject({ refundMinor: amountMinor }),
    response: enrolmentView,
  },
  'checkout.quote-giving-up-for': { params: enrolmentParams, response: giveUpQuote },
  'checkout.give-up-for': {
    params: enrolmentParams,
    body: z.strictObject({ refundMinor: amountMinor }),
    response: enrolmentView,
  },
  'checkout.choose': {
    params: z.strictObject({ placeId: id }),
    body: z.strictObject({ choice: z.enum(['credit', 'money']) }),
    response: z.null(),
  },
  'checkout.take-cash': {
    params: enrolmentParams,
    body: z.strictObject({ amountMinor }),
    response: enrolmentView,
  },
  'payments.read': {
    response: z.object({ state: z.enum(['none', 'started', 'ready']) }),
  },
  'payments.connect': {
    response: z.object({ url: z.string() }),
  },
} as const
