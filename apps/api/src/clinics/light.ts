import { darkMinutesOf, duskAt } from '@marram/schedule'
import type { Academy } from '../academies/academies'
import type { Venue } from '../venues/venues'

/** When it gets dark over a venue on a day, by the academy's choice of dusk; null where it never does. */
export function duskOver(
  venue: Pick<Venue, 'latitudeDeg' | 'longitudeDeg' | 'zone'>,
  { dayLocal, duskKind }: { dayLocal: string; duskKind: Academy['duskKind'] },
): Date | null {
  const { latitudeDeg, longitudeDeg, zone } = venue
  const rule = duskKind === 'civil' ? 'civil-twilight' : 'sunset'
  return duskAt({ latitudeDeg, longitudeDeg, dayLocal, zone }, rule)
}

/** Minutes of a session in the dark. One area without lamps or roof is enough for dusk to matter. */
export function darkMinutesIn(
  session: { startsAt: Date; endsAt: Date; duskAt: Date | null },
  areas: readonly { hasLamps: boolean; isCovered: boolean }[],
): number {
  const isLit = areas.length > 0 && areas.every((area) => area.hasLamps || area.isCovered)
  return isLit ? 0 : darkMinutesOf(session, session.duskAt)
}
