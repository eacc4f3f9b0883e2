import { z } from 'zod'
import { id, instant, localDate } from './fields'
import { coachBrief, sessionBrief } from './clinics'
import { HANDS } from './golfers'

export const MARKS = ['present', 'late', 'absent', 'excused'] as const

export const registerRow = z.object({
  placeId: id,
  golferId: id,
  name: z.string(),
  mark: z.enum(MARKS).nullable(),
  markedBy: z.string().nullable(),
  markedAt: instant.nullable(),
  handicap: z.number().nullable(),
  hand: z.enum(HANDS),
  isJunior: z.boolean(),
  note: z.string(),
  /** Sessions of this clinic already held in which the golfer was late. */
  lateBefore: z.int(),
  joinedAtNumber: z.int(),
  isUnpaid: z.boolean(),
})

export const registerView = z.object({
  session: sessionBrief.extend({
    clinicId: id,
    clinicTitle: z.string(),
    sessionsTotal: z.int(),
    zone: z.string(),
  }),
  revision: z.int(),
  closedAt: instant.nullable(),
  closedBy: z.string().nullable(),
  rows: z.array(registerRow),
})

const sessionParams = z.strictObject({ sessionId: id })

export const registerSchemas = {
  'register.day': {
    params: z.strictObject({ date: localDate }),
    response: z.object({
      zone: z.string(),
      dayLocal: localDate,
      duskAt: instant.nullable(),
      registers: z.array(registerView),
    }),
  },
  'register.read': { params: sessionParams, response: registerView },
  'register.mark': {
    params: z.strictObject({ sessionId: id, placeId: id }),
    body: z.strictObject({
      mark: z.enum(MARKS).nullable(),
      /** When it was pressed, by the phone's clock: the last press counts, whenever it arrives. */
      markedAt: instant.optional(),
    }),
    response: registerRow,
  },
  'register.close': {
    params: sessionParams,
    body: z.strictObject({ revision: z.int().min(0) }),
    response: registerView,
  },
  'register.reopen': {
    params: sessionParams,
    body: z.strictObject({ revision: z.int().min(0) }),
    response: registerView,
  },
  'register.card': {
    params: z.strictObject({ clinicId: id }),
    response: z.object({
      coaches: z.array(coachBrief),
      rows: z.array(
        z.object({
          golferId: id,
          name: z.string(),
          note: z.string(),
          enrolmentId: id,
          /** By session id; a golfer without a place in a session has no key. */
          marks: z.record(z.string(), z.enum([...MARKS, 'not-yet'])),
        }),
      ),
      /** Null for those who may not read the ledger. */
      money: z
        .object({
          paidMinor: z.int(),
          taxMinor: z.int(),
          earnedMinor: z.int(),
          toEarnMinor: z.int(),
        })
        .nullable(),
    }),
  },
} as const
