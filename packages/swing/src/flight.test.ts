import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { airDensityKgM3, type Air } from './air'
import { BALL_MODELS, FITTED_BALL, TUNNEL_BALL, type BallModel } from './ball-models'
import { flightOf } from './flight'
import { BALL_RADIUS_METRES, type Launch } from './impact'
import { toRad } from './vectors'

const GRAVITY_MPS2 = 9.80665
const still: Air = { densityKgM3: 1.225, windAlongMps: 0, windRightMps: 0 }
const nothing: Air = { ...still, densityKgM3: 0 }

const launch = (change: Partial<Launch>): Launch => ({
  speedMps: 70,
  upDeg: 11,
  startDeg: 0,
  spinRpm: 2800,
  tiltDeg: 0,
  spinLoftDeg: 0,
  ...change,
})

describe('air', () => {
  // International Standard Atmosphere [D], kg/m³.
  it.each([
    [0, 1.225],
    [500, 1.1673],
    [1000, 1.1116],
    [1500, 1.0581],
    [2000, 1.0065],
  ])('at %d m', (altitudeMetres, densityKgM3) => {
    expect(airDensityKgM3({ altitudeMetres })).toBeCloseTo(densityKgM3, 4)
  })

  it('is thinner on a warm day', () => {
    const [cold, warm] = [5, 35].map((celsius) => airDensityKgM3({ altitudeMetres: 0, celsius }))
    expect(warm! / cold!).toBeCloseTo((5 + 273.15) / (35 + 273.15), 9)
  })

  // [D] terminal speed √(2mg/(ρ·A·CD)); from a height H a ball comes down with that speed times
  // √(1 − exp(−2gH/v²)).
  it.each([
    [0.5, 32.07],
    [0.25, 45.35],
  ])('lets a ball of CD %d fall towards %d m/s', (drag, terminalMps) => {
    const ball: BallModel = { ...FITTED_BALL, drag: () => drag, lift: () => 0, moment: () => 0 }
    const upwards = launch({ speedMps: 200, upDeg: 89.999, spinRpm: 0 })
    const { apexMetres, landingSpeedMps } = flightOf(upwards, { air: still, ball })
    const fall = Math.exp((-2 * GRAVITY_MPS2 * apexMetres) / terminalMps ** 2)
    expect(landingSpeedMps).toBeCloseTo(terminalMps * Math.sqrt(1 - fall), 2)
  })
})

describe('a flight', () => {
  // Closed form [D]: 127.465 m, 8.539 m, 2.639 s.
  it('in a vacuum is a parabola, to a millionth', () => {
    const up = toRad(15)
    const flight = flightOf(launch({ speedMps: 50, upDeg: 15 }), {
      air: nothing,
      ball: FITTED_BALL,
    })
    const carry = (50 ** 2 * Math.sin(2 * up)) / GRAVITY_MPS2
    expect(carry).toBeCloseTo(127.465, 3)
    expect(Math.abs(flight.carryMetres - carry)).toBeLessThan(1e-6)
    expect(flight.apexMetres).toBeCloseTo((50 * Math.sin(up)) ** 2 / (2 * GRAVITY_MPS2), 6)
    expect(flight.seconds).toBeCloseTo((2 * 50 * Math.sin(up)) / GRAVITY_MPS2, 6)
  })

  // Quintavalla's fit, 70 m/s, 11°, 2800 rpm [D]: within 0.1 %.
  it('of the fitted ball comes to what the fit gives', () => {
    const flight = flightOf(launch({}), { air: still, ball: FITTED_BALL })
    expect(Math.abs(flight.carryMetres / 228.33 - 1)).toBeLessThan(0.001)
    expect(Math.abs(flight.apexMetres / 27.42 - 1)).toBeLessThan(0.001)
    expect(Math.abs(flight.seconds / 6.482 - 1)).toBeLessThan(0.001)
  })

  it('is mirrored by a mirrored launch, and curves to the side of its tilt', () => {
    const side = fc.double({ min: -20, max: 20, noNaN: true })
    fc.assert(
      fc.property(side, side, fc.constantFrom(...BALL_MODELS), (startDeg, tiltDeg, ball) => {
        const right = flightOf(launch({ startDeg, tiltDeg }), { air: still, ball })
        const left = flightOf(launch({ startDeg: -startDeg, tiltDeg: -tiltDeg }), {
          air: still,
          ball,
        })
        expect(left.sideMetres).toBeCloseTo(-right.sideMetres, 6)
        expect(left.carryMetres).toBeCloseTo(right.carryMetres, 6)
        if (Math.abs(tiltDeg) > 0.1) expect(Math.sign(right.curveMetres)).toBe(Math.sign(tiltDeg))
      }),
    )
  })

  it('loses energy to still air and wins none', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 15, max: 80, noNaN: true }),
        fc.double({ min: 5, max: 50, noNaN: true }),
        fc.constantFrom(...BALL_MODELS),
        (speedMps, upDeg, ball) => {
          const flight = flightOf(launch({ speedMps, upDeg }), { air: still, ball })
          expect(flight.landingSpeedMps).toBeLessThan(speedMps)
          expect(flight.carryMetres).toBeGreaterThan(0)
          expect(flight.apexMetres).toBeGreaterThan(0)
        },
      ),
    )
  })

  it('goes farther in thin air and with the wind, and drifts with a wind from the side', () => {
    const carry = (change: Partial<Air>) =>
      flightOf(launch({}), { air: { ...still, ...change }, ball: FITTED_BALL })
    expect(carry({ densityKgM3: 1.0065 }).carryMetres).not.toBe(carry({}).carryMetres)
    expect(carry({ windAlongMps: 5 }).carryMetres).toBeGreaterThan(carry({}).carryMetres)
    expect(carry({ windAlongMps: -5 }).carryMetres).toBeLessThan(carry({}).carryMetres)
    expect(carry({ windRightMps: 5 }).sideMetres).toBeGreaterThan(1)
  })

  it('is refused for a launch into the ground, or none', () => {
    for (const change of [{ upDeg: 0 }, { upDeg: -3 }, { speedMps: 0 }, { spinRpm: NaN }]) {
      expect(() => flightOf(launch(change), { air: still, ball: FITTED_BALL })).toThrow(RangeError)
    }
  })
})

describe('the ball models', () => {
  // Bearman & Harvey 1976, hexagonal dimples [2]: speed, rpm, CD, CL.
  it.each([
    [13.7, 2000, 0.3624, 0.104],
    [55.2, 3000, 0.2602, 0.1916],
    [71.9, 2800, 0.255, 0.1584],
  ])('meet the wind tunnel’s nodes at %d m/s and %d rpm', (speedMps, rpm, drag, lift) => {
    const spinRatio = ((rpm * 2 * Math.PI) / 60) * (BALL_RADIUS_METRES / speedMps)
    expect(TUNNEL_BALL.drag(speedMps, spinRatio)).toBeCloseTo(drag, 9)
    expect(TUNNEL_BALL.lift(speedMps, spinRatio)).toBeCloseTo(lift, 9)
  })

  it('lift no ball without spin, and jump nowhere', () => {
    for (const ball of BALL_MODELS) {
      expect(ball.lift(50, 0)).toBe(0)
      for (let spinRatio = 0; spinRatio < 0.4; spinRatio += 0.001) {
        const step = ball.lift(50, spinRatio + 0.001) - ball.lift(50, spinRatio)
        expect(Math.abs(step)).toBeLessThan(0.01)
      }
    }
  })
})
