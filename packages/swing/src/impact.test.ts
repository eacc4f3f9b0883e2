import { describe, expect, it } from 'vitest'
import { launchOf, type Delivery } from './impact'

const straight = { attackDeg: 0, pathDeg: 0, faceDeg: 0 }

describe('a rigid impact with a ball that rolls as it leaves', () => {
  // [D] from the formulas over them; ball speed in m/s, ball by club speed, face share, rpm.
  it.each([
    [50, 12, 0.2, 0.83, 72.839, 1.4568, 0.8172, 3118.9],
    [50, 10.5, 0.2, 0.83, 73.206, 1.4641, 0.8179, 2733.7],
    [40, 34, 0.27, 0.7, 48.563, 1.2141, 0.788, 6819.6],
  ])('at %d m/s and %d° of spin loft', (speedMps, loftDeg, headKg, restitution, ...expected) => {
    const launch = launchOf({ ...straight, speedMps, loftDeg }, { headKg, restitution })
    const [ballMps, ratio, share, rpm] = expected
    expect(launch.speedMps).toBeCloseTo(ballMps, 3)
    expect(launch.speedMps / speedMps).toBeCloseTo(ratio, 4)
    expect(launch.upDeg / loftDeg).toBeCloseTo(share, 4)
    expect(launch.spinRpm).toBeCloseTo(rpm, 1)
    expect(launch.spinLoftDeg).toBeCloseTo(loftDeg, 9)
  })

  it('starts the ball where the face looks by as much as was measured', () => {
    // Wood, Henrikson & Broadie 2018, MDPI Proceedings 2:249 [S]: 61 to 83 %.
    for (const loftDeg of [10.5, 24, 34, 46]) {
      const club = { headKg: 0.25, restitution: 0.76 }
      const { startDeg } = launchOf({ ...straight, faceDeg: 4, speedMps: 40, loftDeg }, club)
      expect(startDeg / 4).toBeGreaterThan(0.61)
      expect(startDeg / 4).toBeLessThan(0.83)
    }
  })
})

describe('the tilt of the spin’s axis', () => {
  const tiltOf = (delivery: Omit<Delivery, 'speedMps'>) =>
    launchOf({ ...delivery, speedMps: 45 }, { headKg: 0.2, restitution: 0.83 }).tiltDeg

  // [D] in the right-handed frame, spin axis = path × normal.
  it.each([
    [{ faceDeg: 2, loftDeg: 15, pathDeg: -2, attackDeg: 0 }, 14.592],
    [{ faceDeg: 0, loftDeg: 24, pathDeg: -4, attackDeg: -4 }, 7.714],
  ])('of %j', (delivery, tiltDeg) => {
    expect(tiltOf(delivery)).toBeCloseTo(tiltDeg, 3)
  })

  it('is the other way for the mirrored delivery, and nothing for a square one', () => {
    const delivery = { faceDeg: 3, loftDeg: 20, pathDeg: -1, attackDeg: -2 }
    const mirrored = { ...delivery, faceDeg: -3, pathDeg: 1 }
    expect(tiltOf(mirrored)).toBeCloseTo(-tiltOf(delivery), 9)
    expect(tiltOf({ ...delivery, faceDeg: 0, pathDeg: 0 })).toBeCloseTo(0, 9)
  })
})
