import type { ClubHead } from './impact'

/** A club as it is built: nominal figures, from memory; academies change them. */
export interface Club extends ClubHead {
  loftDeg: number
  lieDeg: number
}

/** In the order in which a bag is laid out. */
export const CLUBS = {
  driver: { loftDeg: 10.5, lieDeg: 58, headKg: 0.2, restitution: 0.83 },
  'fairway-wood': { loftDeg: 15, lieDeg: 57.5, headKg: 0.208, restitution: 0.8 },
  '5-iron': { loftDeg: 26, lieDeg: 61.5, headKg: 0.256, restitution: 0.76 },
  '7-iron': { loftDeg: 34, lieDeg: 62.5, headKg: 0.27, restitution: 0.74 },
  '9-iron': { loftDeg: 42, lieDeg: 63.5, headKg: 0.284, restitution: 0.72 },
  'pitching-wedge': { loftDeg: 46, lieDeg: 64, headKg: 0.29, restitution: 0.7 },
  'sand-wedge': { loftDeg: 56, lieDeg: 64, headKg: 0.3, restitution: 0.68 },
} as const satisfies Record<string, Club>

export type ClubName = keyof typeof CLUBS
