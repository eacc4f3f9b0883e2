import { cross, toDeg, toRad, turnBetween, turned, type Turn, type Vector } from './vectors'

/**
 * The lead wrist, in degrees, with the signs of the International Society of Biomechanics (Wu et
 * al. 2005): flexion and ulnar deviation are positive, zero is the anatomical neutral. So extension
 * is negative flexion, and radial deviation negative ulnar.
 */
export interface WristAngles {
  flexionDeg: number
  ulnarDeg: number
}

/** How the club lies in the hand, in degrees. */
export interface Grip {
  /** Between forearm and shaft at a neutral wrist: k0. */
  neutralDeg: number
  /** The hand turned about the shaft, γ; positive strengthens the grip. */
  rotationDeg: number
}

/** Where players start who have not been measured: common practice, no published source. */
export const USUAL_GRIP: Grip = { neutralDeg: 30, rotationDeg: 0 }

/** The same wrist as the model counts it: extension and the hinge κ = k0 + radial deviation. */
interface ModelAngles {
  extensionRad: number
  hingeRad: number
}

/** The only place where the anatomical signs become the model's. */
function toModel({ flexionDeg, ulnarDeg }: WristAngles, { neutralDeg }: Grip): ModelAngles {
  return { extensionRad: -toRad(flexionDeg), hingeRad: toRad(neutralDeg - ulnarDeg) }
}

/**
 * The angle between forearm and shaft, in degrees: cos K = cos E · cos κ, with E extension and
 * κ = k0 + radial deviation.
 */
export function forearmShaftAngleDeg(wrist: WristAngles, grip: Grip): number {
  const { extensionRad, hingeRad } = toModel(wrist, grip)
  return toDeg(Math.acos(Math.cos(extensionRad) * Math.cos(hingeRad)))
}

/**
 * What a change of extension does to a club that hinges by κ, exactly: a twist of the face about the
 * shaft (open is positive) and a swing of the shaft, both in degrees.
 *
 * τ = 2·atan(tan(d/2)·sin κ), θ = 2·asin(cos κ·sin(d/2)). At κ = 90° all is twist, at 0 all swing.
 */
export function splitExtension({ changeDeg, hingeDeg }: { changeDeg: number; hingeDeg: number }): {
  twistDeg: number
  swingDeg: number
} {
  const half = toRad(changeDeg) / 2
  const hinge = toRad(hingeDeg)
  return {
    twistDeg: toDeg(2 * Math.atan(Math.tan(half) * Math.sin(hinge))),
    swingDeg: toDeg(2 * Math.asin(Math.cos(hinge) * Math.sin(half))),
  }
}

/** The club as it is delivered: the face in the ground's frame, in degrees. */
export interface Face {
  /** Open to the target line is positive, for the player's own hand. */
  openDeg: number
  /** Of the face over the horizontal, at that moment. */
  loftDeg: number
}

/** A club whose face is known with one wrist, and wanted with another. */
export interface WristChange {
  from: WristAngles
  to: WristAngles
  grip: Grip
  /** Between shaft and ground at the first impact, seen down the target line. */
  lieDeg: number
  /** The face at the first impact: measured where it was, else square with the club's loft. */
  face: Face
}

/** The two bounding cases, between which a real player lies. */
export interface FaceBand {
  /** The forearm does in the second swing what it did in the first. */
  forearmFixed: Face
  /** The arms bring the shaft back to the lean that it had. */
  leanHeld: Face
}

/**
 * Where a changed wrist takes the face, by exact rotations, in both bounding cases.
 *
 * Ground frame: x to the target, y left, z up. At the first impact the shaft has no lean, and the
 * back of the hand faces the target, turned about the shaft by the grip's rotation γ. The wrist
 * turns the hand in the forearm: extension about the forearm's radial axis, then the hinge about the
 * back of the hand. With the forearm fixed the club goes where that takes it. With the lean held the
 * arms bring the shaft back, by the shortest turn, to no lean and to the lie that the wrist has made:
 * the hinge moves it degree for degree (×cos γ), extension only with a turned grip (×cos κ·sin γ).
 */
export function faceAfter({ from, to, grip, lieDeg, face }: WristChange): FaceBand {
  const first = toModel(from, grip)
  const second = toModel(to, grip)
  const turnedRad = toRad(grip.rotationDeg)
  const shaft = shaftAt(toRad(lieDeg))
  const back = turned(TO_TARGET, { axis: shaft, angleRad: turnedRad })
  const forearm = turned(shaft, { axis: back, angleRad: first.hingeRad })
  const radial = cross(forearm, back)
  const extended = { axis: radial, angleRad: second.extensionRad - first.extensionRad }
  const wrist: Turn[] = [
    { axis: back, angleRad: first.hingeRad },
    extended,
    { axis: turned(back, extended), angleRad: -second.hingeRad },
  ]
  const normal = wrist.reduce<Vector>(turned, normalOf(face))
  const lieRad =
    toRad(lieDeg) -
    (second.hingeRad - first.hingeRad) * Math.cos(turnedRad) -
    extended.angleRad * Math.cos(first.hingeRad) * Math.sin(turnedRad)
  const held = turnBetween({ from: wrist.reduce<Vector>(turned, shaft), to: shaftAt(lieRad) })
  return { forearmFixed: faceOf(normal), leanHeld: faceOf(turned(normal, held)) }
}

const TO_TARGET: Vector = [1, 0, 0]

/** From the hands to the head, away from the player and down. */
const shaftAt = (lieRad: number): Vector => [0, -Math.cos(lieRad), -Math.sin(lieRad)]

function normalOf({ openDeg, loftDeg }: Face): Vector {
  const open = toRad(openDeg)
  const loft = toRad(loftDeg)
  return [Math.cos(loft) * Math.cos(open), -Math.cos(loft) * Math.sin(open), Math.sin(loft)]
}

function faceOf([x, y, z]: Vector): Face {
  return { openDeg: toDeg(Math.atan2(-y, x)), loftDeg: toDeg(Math.atan2(z, Math.hypot(x, y))) }
}
