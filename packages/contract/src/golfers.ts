import { z } from 'zod'
import { email, id, line, localDate, phone, prose, signedMinor } from './fields'

export const handicap = z.number().min(-10).max(54).multipleOf(0.1)
export const HANDS = ['right', 'left'] as const

const emergencyContact = z.strictObject({ name: line(80), phone })

export const dependantFields = z.strictObject({
  name: line(80),
  bornOn: localDate,
  handicap: handicap.nullable(),
  emergencyContact,
  /** The guardian's consent to the child taking part, given now. */
  hasConsent: z.literal(true, 'A guardian has to agree before a child can take a place.'),
})

export const ownGolferView = z.object({
  id,
  name: z.string(),
  isMe: z.boolean(),
  bornOn: localDate.nullable(),
  ageYears: z.int().nullable(),
  handicap: z.number().nullable(),
  emergencyContact: emergencyContact.nullable(),
})

export const golferListItem = z.object({
  id,
  name: z.string(),
  email: z.string().nullable(),
  isJunior: z.boolean(),
  guardianName: z.string().nullable(),
  handicap: z.number().nullable(),
  hand: z.enum(HANDS),
  placesAhead: z.int(),
})

export const golferView = golferListItem.extend({
  /** False for a minor whose contacts and consents are not for whoever asks, or not now. */
  hasContacts: z.boolean(),
  bornOn: localDate.nullable(),
  ageYears: z.int().nullable(),
  notes: z.string(),
  emergencyContact: emergencyContact.nullable(),
  consents: z.array(z.object({ kind: z.string(), givenBy: z.string(), givenAt: z.string() })),
  creditMinor: signedMinor,
})

export const golferSchemas = {
  'golfers.mine': { response: z.object({ golfers: z.array(ownGolferView) }) },
  'golfers.add-dependant': { body: dependantFields, response: ownGolferView },
  'golfers.list': {
    query: z.strictObject({ search: prose(80).optional() }),
    response: z.object({ golfers: z.array(golferListItem) }),
  },
  'golfers.enter': {
    body: z.strictObject({
      name: line(80),
      email: email.optional(),
      phone: phone.optional(),
      handicap: handicap.nullable().optional(),
      hand: z.enum(HANDS).optional(),
      bornOn: localDate.optional(),
      notes: prose(500).optional(),
      emergencyContact: emergencyContact.optional(),
    }),
    response: golferListItem,
  },
  'golfers.read': { params: z.strictObject({ golferId: id }), response: golferView },
  'golfers.change': {
    params: z.strictObject({ golferId: id }),
    body: z.strictObject({
      name: line(80).optional(),
      handicap: handicap.nullable().optional(),
      hand: z.enum(HANDS).optional(),
      notes: prose(500).optional(),
    }),
    response: golferView,
  },
} as const
