import {
  POSITIONS,
  areComparable,
  changeOf,
  matchUpOf,
  type Change,
  type ClubName,
  type MatchUp,
  type MatchUpThresholds,
  type Position,
  type WristAngles,
  type WristTrack,
} from '@marram/swing'

/** Angles of which some may not be given: those of a target. */
export type Aim = { [Axis in keyof WristAngles]: number | null }
export type AimTrack = Readonly<Record<Position, Aim>>

/** What a swing is compared with; a target has no error, and one for all clubs has none of them. */
export interface Measure {
  club: ClubName | null
  wrist: AimTrack
  errorDeg: number | null
}

export interface Measured extends Measure {
  club: ClubName
  wrist: WristTrack
  errorDeg: number
}

export type WhyNot = 'address' | 'club'

/** By how much two start differently; null on an axis of which the target says nothing. */
export function addressDifference({ from, to }: { from: AimTrack; to: WristTrack }): Aim {
  const less = (axis: keyof WristAngles) => {
    const started = from.address[axis]
    return started === null ? null : inTenths(to.address[axis] - started)
  }
  return { flexionDeg: less('flexionDeg'), ulnarDeg: less('ulnarDeg') }
}

/** Why a swing cannot be compared with another, or with a target; nothing where it can. */
export function whyNotComparable(given: {
  from: Measure
  to: Measured
  toleranceDeg: number
}): WhyNot[] {
  const { from, to, toleranceDeg } = given
  const started = { ...to.wrist, address: filledFrom(from.wrist.address, to.wrist.address) }
  const startAlike = areComparable({ one: started, other: to.wrist, toleranceDeg })
  const areOfOneClub = from.club === null || from.club === to.club
  return [...(startAlike ? [] : ['address' as const]), ...(areOfOneClub ? [] : ['club' as const])]
}

/** What a target leaves open cannot differ from the swing. */
const filledFrom = (aim: Aim, swing: WristAngles): WristAngles => ({
  flexionDeg: aim.flexionDeg ?? swing.flexionDeg,
  ulnarDeg: aim.ulnarDeg ?? swing.ulnarDeg,
})

export interface AngleDifference extends Change {
  position: Position
  axis: 'flexion' | 'ulnar'
}

const AXES = [
  ['flexion', 'flexionDeg'],
  ['ulnar', 'ulnarDeg'],
] as const

/** Angle by angle, what became of it and whether that is a change; without those nobody aimed at. */
export function differencesOf({ from, to }: { from: Measure; to: Measured }): AngleDifference[] {
  return POSITIONS.flatMap((position) =>
    AXES.flatMap(([axis, key]) => {
      const before = from.wrist[position][key]
      if (before === null) return []
      const of = { valuesDeg: [to.wrist[position][key]], errorDeg: to.errorDeg }
      const against =
        from.errorDeg === null
          ? { targetDeg: before }
          : { valuesDeg: [before], errorDeg: from.errorDeg }
      const change = changeOf({ of, against })
      const differenceDeg = inTenths(change.differenceDeg)
      return [{ position, axis, ...change, differenceDeg }]
    }),
  )
}

/** Each half of a swing's match-up, from the top to impact. */
export function halvesOf(wrist: WristTrack, thresholds: MatchUpThresholds): MatchUp {
  const { extensionOutDeg, radialBackDeg, ...halves } = matchUpOf(wrist, thresholds)
  return {
    ...halves,
    extensionOutDeg: inTenths(extensionOutDeg),
    radialBackDeg: inTenths(radialBackDeg),
  }
}

/** As `halvesOf`, for a target; null where it leaves one of the four angles open. */
export function halvesAimedAt(wrist: AimTrack, thresholds: MatchUpThresholds): MatchUp | null {
  const top = whole(wrist.top)
  const impact = whole(wrist.impact)
  // The address has no part in it.
  return top && impact && halvesOf({ address: top, top, impact }, thresholds)
}

/** Both angles, or null where one is open. */
export function whole({ flexionDeg, ulnarDeg }: Aim): WristAngles | null {
  return flexionDeg === null || ulnarDeg === null ? null : { flexionDeg, ulnarDeg }
}

/** Whether anything is aimed at: a target of open angles alone is none. */
export const isAim = (wrist: AimTrack): boolean =>
  POSITIONS.some((position) => Object.values(wrist[position]).some((angle) => angle !== null))

/** The target of a club: its own, else the one for all clubs. */
export function targetFor<T extends { club: ClubName | null }>(
  targets: readonly T[],
  club: ClubName,
): T | undefined {
  return targets.find((target) => target.club === club) ?? targets.find(({ club: of }) => !of)
}

/** Two swings, the one that was recorded first in front. */
export function inOrder<T extends { id: string; recordedAt: Date }>(one: T, other: T): [T, T] {
  const apart = one.recordedAt.getTime() - other.recordedAt.getTime()
  const isFirst = apart < 0 || (apart === 0 && one.id < other.id)
  return isFirst ? [one, other] : [other, one]
}

/** Whether somebody may take a swing out: who recorded it, and the owner. */
export function mayRemove(
  swing: { recordedBy: string | null },
  by: { accountId: string; scope: 'all' | 'own'; as: 'staff' | 'golfer' },
): boolean {
  return by.as === 'staff' && (by.scope === 'all' || swing.recordedBy === by.accountId)
}

/** Angles come in tenths; a difference of two is a little beside one. */
const inTenths = (deg: number): number => Math.round(deg * 10) / 10
