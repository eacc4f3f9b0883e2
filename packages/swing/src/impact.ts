import { add, cross, dot, lengthOf, scale, toDeg, toRad, type Vector } from './vectors'

/** Golf ball: the heaviest and smallest that the Equipment Rules allow. */
export const BALL_KG = 0.04593
export const BALL_RADIUS_METRES = 0.04267 / 2

/** A club head as it meets the ball. */
export interface ClubHead {
  headKg: number
  /** Of the impact along the face's normal, 0 to 1. */
  restitution: number
}

/** How the head is delivered. Directions are for a right-hander, right of the target positive. */
export interface Delivery {
  speedMps: number
  /** Of the head's way, up positive. */
  attackDeg: number
  pathDeg: number
  faceDeg: number
  /** Of the face over the horizontal, at impact. */
  loftDeg: number
}

/** The ball as it leaves the face. */
export interface Launch {
  speedMps: number
  /** Over the ground. */
  upDeg: number
  /** Where it starts, right of the target positive. */
  startDeg: number
  spinRpm: number
  /** Of the spin's axis from the horizontal; positive curves right. */
  tiltDeg: number
  /** Between the head's way and the face's normal. */
  spinLoftDeg: number
}

const RPM_PER_RADIAN = 60 / (2 * Math.PI)

/**
 * A rigid impact off the head's centre of mass, with the ball rolling on the face as it leaves:
 * with spin loft Λ, q = m/M, head speed V and restitution e,
 * vn = (1+e)·V·cos Λ/(1+q), vt = V·sin Λ/(3.5+q), ω = 2.5·vt/r.
 * The ball leaves the normal towards the head's way by atan(vt/vn). Head off its centre, a sliding
 * ball and the shaft are left out.
 */
export function launchOf(delivery: Delivery, { headKg, restitution }: ClubHead): Launch {
  const { speedMps, attackDeg, pathDeg, faceDeg, loftDeg } = delivery
  const way = direction({ upDeg: attackDeg, rightDeg: pathDeg })
  const normal = direction({ upDeg: loftDeg, rightDeg: faceDeg })
  const axis = cross(way, normal)
  const cos = dot(way, normal)
  const sin = lengthOf(axis)
  const ratio = BALL_KG / headKg
  const alongNormal = ((1 + restitution) * speedMps * cos) / (1 + ratio)
  const alongFace = (speedMps * sin) / (3.5 + ratio)
  const across = sin > 0 ? scale(add(way, scale(normal, -cos)), 1 / sin) : normal
  const [x, y, z] = add(scale(normal, alongNormal), scale(across, sin > 0 ? alongFace : 0))
  return {
    speedMps: Math.hypot(x, y, z),
    upDeg: toDeg(Math.atan2(z, Math.hypot(x, y))),
    startDeg: toDeg(Math.atan2(-y, x)) + 0,
    spinRpm: ((2.5 * alongFace) / BALL_RADIUS_METRES) * RPM_PER_RADIAN,
    tiltDeg: sin > 0 ? toDeg(Math.asin(-axis[2] / sin)) : 0,
    spinLoftDeg: toDeg(Math.atan2(sin, cos)),
  }
}

/** A direction in the ground's frame: x to the target, y left, z up. */
export function direction({ upDeg, rightDeg }: { upDeg: number; rightDeg: number }): Vector {
  const up = toRad(upDeg)
  const right = toRad(rightDeg)
  return [Math.cos(up) * Math.cos(right), -Math.cos(up) * Math.sin(right), Math.sin(up)]
}
