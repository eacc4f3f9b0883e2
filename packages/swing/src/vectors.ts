/** Vectors and rotations in three dimensions, right-handed. */

export type Vector = readonly [x: number, y: number, z: number]

export const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2]

export const cross = (a: Vector, b: Vector): Vector => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
]

export const add = (a: Vector, b: Vector): Vector => [a[0] + b[0], a[1] + b[1], a[2] + b[2]]

export const scale = (a: Vector, factor: number): Vector => [
  a[0] * factor,
  a[1] * factor,
  a[2] * factor,
]

export const lengthOf = (a: Vector): number => Math.hypot(a[0], a[1], a[2])

export const toRad = (deg: number): number => (deg * Math.PI) / 180
export const toDeg = (rad: number): number => (rad * 180) / Math.PI

/** A rotation about an axis of length 1, right-handed (Rodrigues' formula). */
export interface Turn {
  axis: Vector
  angleRad: number
}

/** Turns a vector. */
export function turned(vector: Vector, { axis, angleRad }: Turn): Vector {
  const cos = Math.cos(angleRad)
  const sin = Math.sin(angleRad)
  return add(
    add(scale(vector, cos), scale(cross(axis, vector), sin)),
    scale(axis, dot(axis, vector) * (1 - cos)),
  )
}

/** The shortest turn that brings one direction of length 1 onto another. */
export function turnBetween({ from, to }: { from: Vector; to: Vector }): Turn {
  const normal = cross(from, to)
  const sin = lengthOf(normal)
  // Along one line there is nothing to turn; directions that oppose do not occur for a shaft.
  if (sin < 1e-15) return { axis: [1, 0, 0], angleRad: 0 }
  return { axis: scale(normal, 1 / sin), angleRad: Math.atan2(sin, dot(from, to)) }
}
