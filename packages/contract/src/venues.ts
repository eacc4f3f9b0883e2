import { z } from 'zod'
import { email, id, line, prose, zone } from './fields'

export const AREA_KINDS = ['range', 'short-game', 'putting', 'indoor'] as const

const venueFields = z.strictObject({
  name: line(80),
  address: prose(200),
  gettingHere: prose(600),
  /** Degrees, north positive. */
  latitudeDeg: z.number().min(-89).max(89),
  /** Degrees, east positive. */
  longitudeDeg: z.number().min(-180).max(180),
  zone,
})

const areaFields = z.strictObject({
  name: line(60),
  kind: z.enum(AREA_KINDS),
  /** Bays, holes or mats that a session can take some of. */
  units: z.int().min(1).max(200),
  hasLamps: z.boolean(),
  isCovered: z.boolean(),
})

export const areaView = areaFields.extend({ id, venueId: id })
export const venueView = venueFields.extend({ id, areas: z.array(areaView) })

const coachFields = z.strictObject({
  name: line(80),
  initials: z.string().regex(/^\p{Lu}{1,3}$/u, 'One to three capital letters.'),
  about: prose(600),
})

export const coachView = coachFields.extend({ id, accountId: id.nullable() })

export const venueSchemas = {
  'venues.list': { response: z.object({ venues: z.array(venueView) }) },
  'venues.add': {
    body: venueFields.partial({ address: true, gettingHere: true, zone: true }),
    response: venueView,
  },
  'venues.change': {
    params: z.strictObject({ venueId: id }),
    body: venueFields.partial(),
    response: venueView,
  },
  'areas.add': { params: z.strictObject({ venueId: id }), body: areaFields, response: areaView },
  'areas.change': {
    params: z.strictObject({ areaId: id }),
    body: areaFields.partial(),
    response: areaView,
  },
  'coaches.list': { response: z.object({ coaches: z.array(coachView) }) },
  'coaches.add': {
    body: coachFields.partial({ initials: true, about: true }).extend({ invite: email.optional() }),
    response: coachView,
  },
  'coaches.change': {
    params: z.strictObject({ coachId: id }),
    body: coachFields.partial(),
    response: coachView,
  },
} as const
