import {
  CLUBS,
  WRIST_LIMITS,
  faceAfter,
  type ClubName,
  type FlightBand,
  type WristAngles,
} from '@marram/swing'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { workOut, type Side } from './worked-out'

const toRad = (deg: number) => (deg * Math.PI) / 180
/** A lead wrist as coaches say it: degrees of extension, and towards the little finger. */
const at = (extensionDeg: number, ulnarDeg: number): WristAngles => ({
  flexionDeg: -extensionDeg,
  ulnarDeg,
})
const UNMEASURED = { faceDeg: null, pathDeg: null, attackDeg: null, speedMps: null }
const side = (impact: WristAngles, measured: Partial<Side['delivery']> = {}): Side => ({
  impact,
  delivery: { ...UNMEASURED, ...measured },
})

describe('the measured pair: 18° of extension at impact, then 6°', () => {
  // [D] first order for d = −12 at κ = 30 − ulnar and λ = 62.5: fixed Δopen = −d·cos(λ+κ),
  // Δloft = d·sin(λ+κ); held Δopen = d·sin κ·sin λ, Δloft = d·sin κ·cos λ.
  it.each([-15, -5, 0, 10])('with the wrist at %d° of ulnar deviation', (ulnarDeg) => {
    const d = -12
    const [kappa, lie] = [toRad(30 - ulnarDeg), toRad(62.5)]
    const { face, anchoredTo } = workOut({
      from: side(at(18, ulnarDeg)),
      to: side(at(6, ulnarDeg)),
      club: '7-iron',
      hand: 'right',
    })
    expect(anchoredTo).toBe('square')
    expect(face.from.leanHeld).toEqual({ openDeg: 0, loftDeg: 34 })
    const { forearmFixed, leanHeld } = face.to
    // What the first order leaves out is less than a degree here.
    expect(Math.abs(forearmFixed.openDeg - -d * Math.cos(lie + kappa))).toBeLessThan(0.75)
    expect(Math.abs(forearmFixed.loftDeg - 34 - d * Math.sin(lie + kappa))).toBeLessThan(0.75)
    expect(Math.abs(leanHeld.openDeg - d * Math.sin(kappa) * Math.sin(lie))).toBeLessThan(0.75)
    expect(Math.abs(leanHeld.loftDeg - 34 - d * Math.sin(kappa) * Math.cos(lie))).toBeLessThan(0.75)
    // The belief of the trade, that it closes the face and takes loft off, holds while the arms do.
    expect(leanHeld.openDeg).toBeLessThan(-2)
    expect(leanHeld.loftDeg).toBeLessThan(34)
  })

  it('flies lower, in a band that begins more to the left', () => {
    const { from, to } = workOut({
      from: side(at(18, -5)),
      to: side(at(6, -5)),
      club: '7-iron',
      hand: 'right',
    }).flight
    expect(from.rises).toBe('always')
    expect(from.startDeg.least).toBeCloseTo(from.startDeg.most, 10)
    expect(from.carryMetres.most - from.carryMetres.least).toBeGreaterThan(1)
    expect(to.apexMetres.most).toBeLessThan(from.apexMetres.most)
    expect(to.startDeg.least).toBeLessThan(from.startDeg.least)
  })
})

describe('the face that is known', () => {
  const [from, to] = [at(18, -5), at(6, 2)]
  const worked = (measured: { from?: number; to?: number }) =>
    workOut({
      from: side(from, { faceDeg: measured.from ?? null }),
      to: side(to, { faceDeg: measured.to ?? null }),
      club: '7-iron',
      hand: 'right',
    })
  const band = (given: { from: WristAngles; to: WristAngles; openDeg: number }) =>
    faceAfter({
      from: given.from,
      to: given.to,
      grip: { neutralDeg: 30, rotationDeg: 0 },
      lieDeg: CLUBS['7-iron'].lieDeg,
      face: { openDeg: given.openDeg, loftDeg: 34 },
    })

  it('is the earlier, where it was measured', () => {
    const { anchoredTo, face } = worked({ from: 4 })
    expect(anchoredTo).toBe('from')
    expect(face.from.forearmFixed).toEqual({ openDeg: 4, loftDeg: 34 })
    expect(face.to).toEqual(band({ from, to, openDeg: 4 }))
  })

  it('is the later, where only that was, and the earlier follows backwards', () => {
    const { anchoredTo, face } = worked({ to: -2 })
    expect(anchoredTo).toBe('to')
    expect(face.to.leanHeld).toEqual({ openDeg: -2, loftDeg: 34 })
    expect(face.from).toEqual(band({ from: to, to: from, openDeg: -2 }))
  })

  it('flies as it was measured, whatever the other would make of it', () => {
    const both = worked({ from: 4, to: -2 })
    expect(both.anchoredTo).toBe('from')
    expect(both.face.to).toEqual(band({ from, to, openDeg: 4 }))
    // The path is square: the ball starts on the face's side, between the path and it.
    expect(both.flight.to.startDeg.most).toBeLessThan(0)
    expect(both.flight.to.startDeg.least).toBeGreaterThan(-2)
  })
})

describe('what was not measured', () => {
  const impact = at(10, 0)
  const worked = (from: Partial<Side['delivery']>, to: Partial<Side['delivery']>) =>
    workOut({ from: side(impact, from), to: side(impact, to), club: '7-iron', hand: 'right' })

  it('is taken as usual, and said', () => {
    expect(worked({}, { faceDeg: 1 }).assumed).toEqual(['path', 'attack', 'speed'])
    expect(worked({ pathDeg: -4 }, { speedMps: 40 }).assumed).toEqual(['attack'])
  })

  it('in one is as in the other', () => {
    const { from, to } = worked({ pathDeg: -4 }, { speedMps: 40, attackDeg: -2 }).flight
    expect(from).toEqual(to)
    const own = worked({ speedMps: 30 }, { speedMps: 40 }).flight
    expect(own.from.carryMetres.most).toBeLessThan(own.to.carryMetres.least)
  })
})

it('says so when the ball may stay on the ground', () => {
  // 20° less extension with the forearm fixed leave a driver without loft.
  const { from, to } = workOut({
    from: side(at(20, 0)),
    to: side(at(0, 0)),
    club: 'driver',
    hand: 'right',
  }).flight
  expect(from.rises).toBe('always')
  expect(to.rises).toBe('sometimes')
  expect(to.carryMetres.least).toBe(0)
  expect(to.carryMetres.most).toBeGreaterThan(0)
})

describe('for whatever can be recorded', () => {
  const within = ({ least, most }: { least: number; most: number }) =>
    fc.integer({ min: least * 10, max: most * 10 }).map((tenths) => tenths / 10)
  const maybe = (least: number, most: number) => fc.option(within({ least, most }))
  const anySide: fc.Arbitrary<Side> = fc.record({
    impact: fc.record({
      flexionDeg: within(WRIST_LIMITS.flexionDeg),
      ulnarDeg: within(WRIST_LIMITS.ulnarDeg),
    }),
    delivery: fc.record({
      faceDeg: maybe(-45, 45),
      pathDeg: maybe(-30, 30),
      attackDeg: maybe(-20, 20),
      speedMps: maybe(1, 70),
    }),
  })
  const club = fc.constantFrom(...(Object.keys(CLUBS) as ClubName[]))
  const figures = ({ rises: _, ...ranges }: FlightBand) => Object.values(ranges)

  it('gives bands of finite figures', () => {
    fc.assert(
      fc.property(anySide, anySide, club, (from, to, club) => {
        const { flight } = workOut({ from, to, club, hand: 'right' })
        for (const { least, most } of [...figures(flight.from), ...figures(flight.to)]) {
          expect(Number.isFinite(least) && Number.isFinite(most)).toBe(true)
          expect(least).toBeLessThanOrEqual(most)
        }
      }),
      { numRuns: 300 },
    )
  })

  it('flies a left-hander’s ball as a right-hander’s in the mirror, and nothing else of it', () => {
    fc.assert(
      fc.property(anySide, anySide, club, (from, to, club) => {
        const right = workOut({ from, to, club, hand: 'right' })
        const left = workOut({ from, to, club, hand: 'left' })
        expect(left.face).toEqual(right.face)
        for (const key of ['from', 'to'] as const) {
          const { startDeg, curveMetres, sideMetres, ...rest } = right.flight[key]
          expect(left.flight[key]).toMatchObject(rest)
          for (const [name, { least, most }] of Object.entries({
            startDeg,
            curveMetres,
            sideMetres,
          })) {
            const mirrored = left.flight[key][name as 'startDeg']
            // Adding nothing makes a negative zero a plain one.
            expect(mirrored.least + 0).toBe(0 - most)
            expect(mirrored.most + 0).toBe(0 - least)
          }
        }
      }),
      { numRuns: 100 },
    )
  })
})
