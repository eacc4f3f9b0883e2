import type { WristAngles } from './wrist'

/** Three moments of a swing at which coaches read the lead wrist. */
export const POSITIONS = ['address', 'top', 'impact'] as const
export type Position = (typeof POSITIONS)[number]

export type WristTrack = Readonly<Record<Position, WristAngles>>

/** By how much two swings may differ at address on either axis and still be compared. */
export const USUAL_TOLERANCE_DEG = 3

/** Where the anatomy of most people ends (American Academy of Orthopaedic Surgeons). */
const RANGE_DEG = { flexion: 80, extension: 70, radial: 20, ulnar: 30 } as const
/** Some reach further; beyond this it is a typing error. */
const ALLOWANCE = 1.25

/** What a wrist can be said to read: least and most of each axis, in degrees. */
export const WRIST_LIMITS = {
  flexionDeg: { least: -RANGE_DEG.extension * ALLOWANCE, most: RANGE_DEG.flexion * ALLOWANCE },
  ulnarDeg: { least: -RANGE_DEG.radial * ALLOWANCE, most: RANGE_DEG.ulnar * ALLOWANCE },
} as const

/** Angles come in tenths, whose differences are not exact: 4.4 − 1.4 is a little more than 3. */
const EXACT_TO_DEG = 1e-9

/** Whether two swings start alike, within the tolerance on each axis. */
export function areComparable(given: {
  one: WristTrack
  other: WristTrack
  toleranceDeg: number
}): boolean {
  const { one, other, toleranceDeg } = given
  const differs = (axis: keyof WristAngles): boolean =>
    Math.abs(one.address[axis] - other.address[axis]) > toleranceDeg + EXACT_TO_DEG
  return !differs('flexionDeg') && !differs('ulnarDeg')
}

/** How far each half of the match-up must go, from the top to impact, in degrees. */
export interface MatchUpThresholds {
  extensionOutDeg: number
  radialBackDeg: number
}

export interface MatchUp {
  /** Extension taken out from the top to impact; negative where it grew. */
  extensionOutDeg: number
  /** Radial deviation given back to ulnar. */
  radialBackDeg: number
  isExtensionOut: boolean
  isRadialBack: boolean
}

/**
 * The pair of changes that must go together on the way down: extension comes out, and the hinge
 * comes back from radial to ulnar. Common practice of the trade; thresholds are the academy's.
 */
export function matchUpOf(track: WristTrack, thresholds: MatchUpThresholds): MatchUp {
  const extensionOutDeg = track.impact.flexionDeg - track.top.flexionDeg
  const radialBackDeg = track.impact.ulnarDeg - track.top.ulnarDeg
  return {
    extensionOutDeg,
    radialBackDeg,
    isExtensionOut: extensionOutDeg >= thresholds.extensionOutDeg - EXACT_TO_DEG,
    isRadialBack: radialBackDeg >= thresholds.radialBackDeg - EXACT_TO_DEG,
  }
}
