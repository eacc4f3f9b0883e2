import fc from 'fast-check'
import { Quaternion, Vector3 } from 'three'
import { describe, expect, it } from 'vitest'
import { toRad, turned } from './vectors'
import { USUAL_GRIP, faceAfter, forearmShaftAngleDeg, splitExtension } from './wrist'

/** A wrist by extension and the hinge κ, as the tables have it. */
const wristAt = ({ extensionDeg, hingeDeg }: { extensionDeg: number; hingeDeg: number }) => ({
  flexionDeg: -extensionDeg,
  ulnarDeg: USUAL_GRIP.neutralDeg - hingeDeg,
})

describe('twist and swing of a change of extension', () => {
  // [D] τ = 2·atan(tan(d/2)·sin κ), θ = 2·asin(cos κ·sin(d/2)), to 0.01°.
  it.each([
    [12, 20, 4.118, 11.274],
    [12, 30, 6.016, 10.388],
    [12, 45, 8.501, 8.478],
    [25, 30, 12.651, 21.607],
    [12, 90, 12, 0],
    [12, 0, 0, 12],
  ])('of %d° at κ = %d°', (changeDeg, hingeDeg, twistDeg, swingDeg) => {
    const split = splitExtension({ changeDeg, hingeDeg })
    expect(Math.abs(split.twistDeg - twistDeg)).toBeLessThan(0.01)
    expect(Math.abs(split.swingDeg - swingDeg)).toBeLessThan(0.01)
  })
})

describe('the angle between forearm and shaft', () => {
  // [D] cos K = cos E · cos κ, to 0.01°.
  it.each([
    [25, 0, 30, 38.29],
    [25, 15, 30, 50.144],
  ])('at E = %d°, r = %d°, k0 = %d°', (extensionDeg, radialDeg, neutralDeg, angleDeg) => {
    const wrist = { flexionDeg: -extensionDeg, ulnarDeg: -radialDeg }
    const found = forearmShaftAngleDeg(wrist, { neutralDeg, rotationDeg: 0 })
    expect(Math.abs(found - angleDeg)).toBeLessThan(0.01)
  })
})

/** The face of a 34° club at a lie of 62°, square before 12° of extension are added. */
function afterTwelve(hingeDeg: number) {
  const { forearmFixed, leanHeld } = faceAfter({
    from: wristAt({ extensionDeg: 0, hingeDeg }),
    to: wristAt({ extensionDeg: 12, hingeDeg }),
    grip: USUAL_GRIP,
    lieDeg: 62,
    face: { openDeg: 0, loftDeg: 34 },
  })
  return [forearmFixed.openDeg, forearmFixed.loftDeg - 34, leanHeld.openDeg, leanHeld.loftDeg - 34]
}

describe('the face in the ground’s frame', () => {
  // [D] exact rotations, to 0.01°: fixed open and loft, held open and loft.
  it.each([
    [20, [-1.836, 11.881, 3.679, 1.932]],
    [30, [0.461, 11.993, 5.408, 2.82]],
    [45, [3.841, 11.467, 7.703, 3.979]],
  ])('after 12° of extension at κ = %d°', (hingeDeg, expected) => {
    afterTwelve(hingeDeg).forEach((found, index) => {
      expect(Math.abs(found - expected[index]!)).toBeLessThan(0.01)
    })
  })

  it('can close in one case and open in the other', () => {
    // [D] κ = 15, d = −12: −2.7 held, +2.6 fixed.
    const { forearmFixed, leanHeld } = faceAfter({
      from: wristAt({ extensionDeg: 0, hingeDeg: 15 }),
      to: wristAt({ extensionDeg: -12, hingeDeg: 15 }),
      grip: USUAL_GRIP,
      lieDeg: 62,
      face: { openDeg: 0, loftDeg: 34 },
    })
    expect(leanHeld.openDeg).toBeCloseTo(-2.7, 1)
    expect(forearmFixed.openDeg).toBeCloseTo(2.6, 1)
  })

  it('turns with the lie that the hinge makes, and twists nothing by it', () => {
    // [D] 3° of lie move a face of 34° by tan 34° × 3° = 2.02°, to first order.
    const { forearmFixed, leanHeld } = faceAfter({
      from: { flexionDeg: 0, ulnarDeg: 0 },
      to: { flexionDeg: 0, ulnarDeg: 3 },
      grip: USUAL_GRIP,
      lieDeg: 62,
      face: { openDeg: 0, loftDeg: 34 },
    })
    expect(forearmFixed.openDeg).toBeCloseTo(Math.tan(toRad(34)) * 3, 1)
    expect(leanHeld.openDeg).toBeCloseTo(forearmFixed.openDeg, 9)
  })

  it('goes as the first order says for small changes, also with a turned grip', () => {
    // [D] held: twist d·sin κ about the shaft, and a lie of d·cos κ·sin γ.
    const [changeDeg, hingeDeg, lieDeg, loftDeg, rotationDeg] = [0.01, 25, 60, 30, 20]
    const { leanHeld } = faceAfter({
      from: wristAt({ extensionDeg: 0, hingeDeg }),
      to: wristAt({ extensionDeg: changeDeg, hingeDeg }),
      grip: { ...USUAL_GRIP, rotationDeg },
      lieDeg,
      face: { openDeg: 0, loftDeg },
    })
    const lie = changeDeg * Math.cos(toRad(hingeDeg)) * Math.sin(toRad(rotationDeg))
    const twist = changeDeg * Math.sin(toRad(hingeDeg))
    const open = twist * Math.sin(toRad(lieDeg)) - Math.tan(toRad(loftDeg)) * lie
    const loft = twist * Math.cos(toRad(lieDeg))
    expect(leanHeld.loftDeg - loftDeg).toBeCloseTo(loft, 5)
    expect(Math.abs(leanHeld.openDeg - open) / Math.abs(open)).toBeLessThan(0.35)
  })

  it('stays where it was for a wrist that stays', () => {
    const angle = fc.double({ min: -40, max: 40, noNaN: true })
    fc.assert(
      fc.property(angle, angle, angle, angle, (flexionDeg, ulnarDeg, openDeg, rotationDeg) => {
        const wrist = { flexionDeg, ulnarDeg }
        const { forearmFixed, leanHeld } = faceAfter({
          from: wrist,
          to: wrist,
          grip: { neutralDeg: 30, rotationDeg },
          lieDeg: 62,
          face: { openDeg, loftDeg: 34 },
        })
        for (const face of [forearmFixed, leanHeld]) {
          expect(face.openDeg).toBeCloseTo(openDeg, 6)
          expect(face.loftDeg).toBeCloseTo(34, 6)
        }
      }),
    )
  })
})

describe('rotations', () => {
  it('agree with those of an independent library (three)', () => {
    const part = fc.double({ min: -1, max: 1, noNaN: true })
    fc.assert(
      fc.property(
        fc.tuple(part, part, part),
        fc.tuple(part, part, part),
        fc.double({ min: -7, max: 7, noNaN: true }),
        (vector, towards, angleRad) => {
          const length = Math.hypot(...towards)
          fc.pre(length > 1e-3)
          const axis = towards.map((value) => value / length) as [number, number, number]
          const quaternion = new Quaternion().setFromAxisAngle(new Vector3(...axis), angleRad)
          const expected = new Vector3(...vector).applyQuaternion(quaternion).toArray()
          turned(vector, { axis, angleRad }).forEach((value, index) => {
            expect(value).toBeCloseTo(expected[index]!, 9)
          })
        },
      ),
    )
  })
})
