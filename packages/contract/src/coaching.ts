import { z } from 'zod'
import { comparisonView } from './comparison'
import { id } from './fields'
import {
  club,
  errorDeg,
  method,
  swingFields,
  swingView,
  targetTrack,
  targetView,
  tenths,
} from './swings'

export const coachingSettings = z.object({
  /** By how much two swings may differ at address on either axis and still be compared. */
  toleranceDeg: z.number(),
  errorDeg: z.record(method, z.number()),
  matchUp: z.object({ extensionOutDeg: z.number(), radialBackDeg: z.number() }),
})

const upTo = (most: number) => tenths({ least: 0, most, sentence: `From 0° to ${most}°.` })

const golferParams = z.strictObject({ golferId: id })
const swingParams = z.strictObject({ swingId: id })

const listQuery = z.strictObject({
  club: club.optional(),
  /** Those recorded before this swing: what `next` of the last page was. */
  before: id.optional(),
  limit: z
    .string()
    .regex(/^([1-9]\d?|100)$/, 'From 1 to 100 at a time.')
    .optional(),
})
const swingList = z.object({ swings: z.array(swingView), next: id.nullable() })
const targetList = z.object({ targets: z.array(targetView) })
const compareQuery = z.strictObject({ with: z.union([z.literal('target'), id]) })

export const coachingSchemas = {
  'swings.record': { params: golferParams, body: swingFields, response: swingView },
  'swings.of-golfer': { params: golferParams, query: listQuery, response: swingList },
  'swings.read': { params: swingParams, response: swingView },
  'swings.remove': { params: swingParams, response: z.null() },
  'swings.compare': { params: swingParams, query: compareQuery, response: comparisonView },
  'swings.mine': { params: golferParams, query: listQuery, response: swingList },
  'swings.read-mine': { params: swingParams, response: swingView },
  'swings.compare-mine': { params: swingParams, query: compareQuery, response: comparisonView },
  'targets.read': { params: golferParams, response: targetList },
  'targets.read-mine': { params: golferParams, response: targetList },
  'targets.set': {
    params: golferParams,
    body: z.strictObject({ club: club.nullable(), wrist: targetTrack }),
    response: targetList,
  },
  'coaching-settings.read': { response: coachingSettings },
  'coaching-settings.change': {
    body: z.strictObject({
      toleranceDeg: upTo(15).optional(),
      errorDeg: z.partialRecord(method, errorDeg).optional(),
      matchUp: z
        .strictObject({
          extensionOutDeg: upTo(90).optional(),
          radialBackDeg: upTo(60).optional(),
        })
        .optional(),
    }),
    response: coachingSettings,
  },
} as const
