import { CLUBS, WRIST_LIMITS, type ClubName, type Method } from '@marram/swing'
import { z } from 'zod'
import { id, instant, prose } from './fields'

export const METHODS = [
  'sensor',
  'camera',
  'goniometer',
  'eye',
] as const satisfies readonly Method[]
export const BALL_STARTS = ['pulled', 'straight', 'pushed'] as const
export const BALL_CURVES = ['hook', 'draw', 'straight', 'fade', 'slice'] as const
export const BALL_HEIGHTS = ['low', 'usual', 'high'] as const
export const CONTACTS = ['clean', 'fat', 'thin', 'heel', 'toe', 'shank'] as const

// The keys of an object are texts to the compiler; these are the names it was written with.
export const club = z.enum(Object.keys(CLUBS) as [ClubName, ...ClubName[]])
export const method = z.enum(METHODS)

/** A number in tenths, within a range that is said where it is left. */
export function tenths({
  least,
  most,
  sentence,
}: {
  least: number
  most: number
  sentence: string
}) {
  return z.number().min(least, sentence).max(most, sentence).multipleOf(0.1, 'Tenths at the most.')
}

const { flexionDeg: bend, ulnarDeg: side } = WRIST_LIMITS

/** The lead wrist in degrees: flexion and ulnar deviation positive (ISB, Wu et al. 2005). */
const flexionDeg = tenths({
  ...bend,
  sentence:
    `A wrist reads from ${-bend.least}° of extension (${bend.least}) ` +
    `to ${bend.most}° of flexion (${bend.most}).`,
})
const ulnarDeg = tenths({
  ...side,
  sentence:
    `A wrist reads from ${-side.least}° to the thumb side (${side.least}) ` +
    `to ${side.most}° to the little-finger side (${side.most}).`,
})

export const errorDeg = tenths({
  least: 0.1,
  most: 30,
  sentence: 'A reading errs by 0.1° to 30°.',
})
const distanceMetres = tenths({
  least: 0,
  most: 400,
  sentence: 'A ball goes from 0 to 400 metres.',
})
const faceDeg = tenths({ least: -45, most: 45, sentence: 'A face is within 45° of square.' })
const pathDeg = tenths({ least: -30, most: 30, sentence: 'A path is within 30° of the target.' })
const attackDeg = tenths({ least: -20, most: 20, sentence: 'A head comes within 20° of level.' })
const speedMps = tenths({
  least: 1,
  most: 70,
  sentence: 'A club head moves at 1 to 70 metres a second.',
})

/** Three moments of a swing. */
const track = z.strictObject({
  address: z.strictObject({ flexionDeg, ulnarDeg }),
  top: z.strictObject({ flexionDeg, ulnarDeg }),
  impact: z.strictObject({ flexionDeg, ulnarDeg }),
})

const aim = z.strictObject({ flexionDeg: flexionDeg.nullable(), ulnarDeg: ulnarDeg.nullable() })

/** The same moments as they should be; an angle without a target is null. */
export const targetTrack = z.strictObject({ address: aim, top: aim, impact: aim })

const unsaid = <T extends z.ZodType>(field: T) => field.nullable().default(null)

/** What the ball did, as it was seen, in the words of the golfer's own hand. */
const ball = z.strictObject({
  start: unsaid(z.enum(BALL_STARTS)),
  curve: unsaid(z.enum(BALL_CURVES)),
  height: unsaid(z.enum(BALL_HEIGHTS)),
  contact: unsaid(z.enum(CONTACTS)),
  distanceMetres: unsaid(distanceMetres),
})

/** What was measured of the club: open, and from inside to outside, are positive for either hand. */
const delivery = z.strictObject({
  faceDeg: unsaid(faceDeg),
  pathDeg: unsaid(pathDeg),
  attackDeg: unsaid(attackDeg),
  speedMps: unsaid(speedMps),
})

export const swingFields = z.strictObject({
  /** Made by whoever records, so that a swing sent again after a lost answer is recorded once. */
  id: id.optional(),
  sessionId: id.nullable().default(null),
  club,
  method,
  /** Of one reading; left out, it is the academy's for the method. */
  errorDeg: errorDeg.optional(),
  wrist: track,
  ball: ball.prefault({}),
  delivery: delivery.prefault({}),
  note: prose(500).default(''),
})

export const swingView = z.object({
  id,
  golferId: id,
  sessionId: id.nullable(),
  recordedAt: instant,
  recordedBy: z.string().nullable(),
  mayRemove: z.boolean(),
  club,
  method,
  errorDeg: z.number(),
  wrist: track,
  ball,
  delivery,
  note: z.string(),
})

export const targetView = z.object({
  /** Null for every club that has none of its own. */
  club: club.nullable(),
  wrist: targetTrack,
  setBy: z.string().nullable(),
  setAt: instant,
})
