import { asPart } from '../api/as-part'
import { call } from '../api/client'
import { usualArea, type AreaKind, type Venue } from './area-words'
import { readPosition } from './position'

/** The second sentence of the opening, as its words stand. */
export interface FirstVenueDraft {
  name: string
  latitude: string
  northOrSouth: 'north' | 'south'
  longitude: string
  eastOrWest: 'east' | 'west'
  kind: AreaKind
  units: string
  lamps: 'lamps' | 'no lamps'
  cover: 'covered' | 'open'
  coach: string
}

/** What the words are called that can be wrong, by the fields they are sent as. */
export const WORD_NAMES = {
  'venue.name': 'Name of the venue',
  'venue.latitudeDeg': 'Latitude in degrees',
  'venue.longitudeDeg': 'Longitude in degrees',
  'area.units': 'Bays',
  'coach.name': 'Coach',
} as const

export interface FirstVenueContext {
  slug: string
  me: { name: string; email: string }
  /** What an earlier try got as far as keeping. */
  kept: { venue: Venue | undefined; hasCoach: boolean }
}

/** Goes on where an earlier try stopped, so that nothing is kept twice. */
export async function keepFirstVenue(
  { slug, me, kept }: FirstVenueContext,
  draft: FirstVenueDraft,
): Promise<void> {
  const venue = kept.venue ?? (await asPart('venue', addVenue(slug, draft)))
  if (venue.areas.length === 0) await asPart('area', addArea(slug, venue.id, draft))
  if (kept.hasCoach) return
  const isMe = draft.coach.trim() === me.name
  const body = { name: draft.coach, ...(isMe ? { invite: me.email } : {}) }
  await asPart('coach', call('coaches.add', { academy: slug, body }))
}

async function addVenue(academy: string, draft: FirstVenueDraft) {
  const { latitudeDeg, longitudeDeg } = readPosition(draft)
  const body = {
    name: draft.name,
    latitudeDeg: draft.northOrSouth === 'south' ? -latitudeDeg : latitudeDeg,
    longitudeDeg: draft.eastOrWest === 'west' ? -longitudeDeg : longitudeDeg,
  }
  return call('venues.add', { academy, body })
}

async function addArea(academy: string, venueId: string, draft: FirstVenueDraft) {
  const body = {
    ...usualArea(draft.kind),
    units: Number(draft.units),
    hasLamps: draft.lamps === 'lamps',
    isCovered: draft.cover === 'covered',
  }
  return call('areas.add', { academy, params: { venueId }, body })
}
