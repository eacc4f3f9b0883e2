import type { Sent } from '@marram/contract'
import { localDayOf, localTimeOf } from '../academies/local-day'
import type { Session } from './queries'

type Body = Sent<'sessions.change', 'body'>

/** A session as its fields hold it while it is being changed. */
export interface SessionWish {
  startsOnLocal: string
  startsAtLocal: string
  durationMinutes: string
  capacity: string
  coachId: string
  areaId: string
  fromUnit: string
  toUnit: string
}

export function wishOf(session: Session, zone: string): SessionWish {
  const { startsAt, endsAt } = session
  const [coach] = session.coaches
  const [area] = session.areas
  return {
    startsOnLocal: localDayOf(startsAt, zone),
    startsAtLocal: localTimeOf(startsAt, zone),
    durationMinutes: String((Date.parse(endsAt) - Date.parse(startsAt)) / 60_000),
    capacity: String(session.capacity),
    coachId: coach?.id ?? '',
    areaId: area?.id ?? '',
    fromUnit: String(area?.fromUnit ?? 1),
    toUnit: String(area?.toUnit ?? 1),
  }
}

/** What is sent: its coach and its area only where they are another; further ones stay. */
export function changeOf(wish: SessionWish, session: Session): Body {
  const [coach, ...moreCoaches] = session.coaches
  const [area, ...moreAreas] = session.areas
  const [fromUnit, toUnit] = [Number(wish.fromUnit), Number(wish.toUnit)]
  const isSameArea =
    area?.id === wish.areaId && area.fromUnit === fromUnit && area.toUnit === toUnit
  const kept = moreAreas.map((each) => ({
    areaId: each.id,
    fromUnit: each.fromUnit,
    toUnit: each.toUnit,
  }))
  return {
    startsOnLocal: wish.startsOnLocal,
    startsAtLocal: wish.startsAtLocal,
    durationMinutes: Number(wish.durationMinutes),
    capacity: Number(wish.capacity),
    ...(coach?.id === wish.coachId
      ? {}
      : { coachIds: [wish.coachId, ...moreCoaches.map(({ id }) => id)] }),
    ...(isSameArea ? {} : { areas: [{ areaId: wish.areaId, fromUnit, toUnit }, ...kept] }),
  }
}
