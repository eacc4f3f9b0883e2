import type { ClubName } from '@marram/swing'
import { describe, expect, it } from 'vitest'
import {
  addressDifference,
  differencesOf,
  halvesAimedAt,
  halvesOf,
  inOrder,
  isAim,
  mayRemove,
  targetFor,
  whyNotComparable,
  type Aim,
  type Measure,
  type Measured,
} from './rules'

/** A lead wrist as coaches say it: degrees of extension, and towards the little finger. */
const at = (extensionDeg: number, ulnarDeg: number) => ({ flexionDeg: -extensionDeg, ulnarDeg })
const OPEN: Aim = { flexionDeg: null, ulnarDeg: null }

/**
 * [P] A pair that coaches measure with a seven-iron, of one player: the first slices, the second is
 * straight, lower and longer. Only extension is known of it; the hinge is as good as any.
 */
const slice: Measured = {
  club: '7-iron',
  wrist: { address: at(28, 5), top: at(44, -15), impact: at(18, -5) },
  errorDeg: 3,
}
const straight: Measured = {
  club: '7-iron',
  wrist: { address: at(30, 5), top: at(33, -15), impact: at(6, 2) },
  errorDeg: 3,
}

describe('two swings are comparable', () => {
  const startingAt = (address: Aim): Measure => ({
    club: null,
    wrist: { address, top: OPEN, impact: OPEN },
    errorDeg: null,
  })

  it.each([
    { what: 'when they start alike', from: slice, whyNot: [] },
    { what: 'not with another club', from: { ...slice, club: 'driver' }, whyNot: ['club'] },
    { what: 'with a target for all clubs', from: { ...slice, club: null }, whyNot: [] },
    { what: 'at the tolerance', from: startingAt(at(33, 5)), whyNot: [] },
    { what: 'not a tenth beyond it', from: startingAt(at(33.1, 5)), whyNot: ['address'] },
    { what: 'nor on the other axis', from: startingAt(at(30, 1.9)), whyNot: ['address'] },
    {
      what: 'with an axis nobody aimed at',
      from: startingAt({ flexionDeg: null, ulnarDeg: 5 }),
      whyNot: [],
    },
    {
      what: 'for neither reason',
      from: { ...startingAt(at(50, 5)), club: 'driver' },
      whyNot: ['address', 'club'],
    },
  ] as const)('$what', ({ from, whyNot }) => {
    expect(whyNotComparable({ from, to: straight, toleranceDeg: 3 })).toEqual(whyNot)
  })

  it('and differ by so much at address', () => {
    const difference = addressDifference({ from: slice.wrist, to: straight.wrist })
    expect(difference).toEqual({ flexionDeg: -2, ulnarDeg: 0 })
    const target = startingAt({ flexionDeg: null, ulnarDeg: 4.9 })
    const open = addressDifference({ from: target.wrist, to: straight.wrist })
    expect(open).toEqual({ flexionDeg: null, ulnarDeg: 0.1 })
  })
})

describe('what became of an angle', () => {
  const extension = (from: Measure, to: Measured) =>
    differencesOf({ from, to })
      .filter(({ axis }) => axis === 'flexion')
      .map(({ differenceDeg, isChange }) => [differenceDeg, isChange])

  // [P] 28 → 44 → 18 against 30 → 33 → 6 degrees of extension; [D] the least that counts.
  it.each([
    { method: 'a sensor', errorDeg: 3, leastDeg: 8.32, changes: [false, true, true] },
    { method: 'a camera', errorDeg: 5, leastDeg: 13.86, changes: [false, false, false] },
    { method: 'a goniometer', errorDeg: 6, leastDeg: 16.63, changes: [false, false, false] },
  ])('by $method is a change from $leastDeg°', ({ errorDeg, leastDeg, changes }) => {
    const [from, to] = [
      { ...slice, errorDeg },
      { ...straight, errorDeg },
    ]
    const [one] = differencesOf({ from, to })
    expect(one?.leastDeg).toBeCloseTo(leastDeg, 2)
    const flexions = [-2, 11, 12]
    expect(extension(from, to)).toEqual(flexions.map((flexion, n) => [flexion, changes[n]]))
  })

  it('by two methods counts the errors of both', () => {
    const [one] = differencesOf({ from: { ...slice, errorDeg: 4 }, to: straight })
    // [D] 1.96·√(4² + 3²) = 9.8.
    expect(one).toMatchObject({ leastDeg: 9.8, by: 'measuring' })
  })

  it('against a target errs once, and says nothing of what nobody aimed at', () => {
    const aim = { address: OPEN, top: OPEN, impact: { flexionDeg: 0, ulnarDeg: null } }
    const found = differencesOf({ from: { club: null, wrist: aim, errorDeg: null }, to: straight })
    expect(found).toHaveLength(1)
    // [D] 1.96 · 3.
    expect(found[0]).toMatchObject({ position: 'impact', axis: 'flexion', differenceDeg: -6 })
    expect(found[0]?.leastDeg).toBeCloseTo(5.88, 10)
    expect(found[0]?.isChange).toBe(true)
  })
})

describe('a match-up', () => {
  const thresholds = { extensionOutDeg: 20, radialBackDeg: 15 }

  it('is told half by half', () => {
    expect(halvesOf(slice.wrist, thresholds)).toEqual({
      extensionOutDeg: 26,
      radialBackDeg: 10,
      isExtensionOut: true,
      isRadialBack: false,
    })
    expect(halvesOf(straight.wrist, thresholds)).toMatchObject({ isRadialBack: true })
  })

  it('of a target is told where it says enough', () => {
    expect(halvesAimedAt({ ...slice.wrist, address: OPEN }, thresholds)?.extensionOutDeg).toBe(26)
    const impact = { ...slice.wrist.impact, ulnarDeg: null }
    expect(halvesAimedAt({ ...slice.wrist, impact }, thresholds)).toBeNull()
  })
})

describe('a target', () => {
  const of = (club: ClubName | null) => ({ club })
  const [own, all, driver] = [of('7-iron'), of(null), of('driver')]

  it.each([
    { of: 'its own club', targets: [all, own], found: own },
    { of: 'all clubs', targets: [all, driver], found: all },
    { of: 'another club', targets: [driver], found: undefined },
  ])('of $of', ({ targets, found }) => {
    expect(targetFor(targets, '7-iron')).toBe(found)
  })

  it('is none when every angle is open', () => {
    const open = { address: OPEN, top: OPEN, impact: OPEN }
    expect(isAim(open)).toBe(false)
    expect(isAim({ ...open, top: { flexionDeg: null, ulnarDeg: 0 } })).toBe(true)
  })
})

it('puts what was recorded first in front, and the lower number where both are of one moment', () => {
  const [early, late] = [new Date(1), new Date(2)]
  const one = { id: 'b', recordedAt: early }
  expect(inOrder(one, { id: 'a', recordedAt: late })[0]).toBe(one)
  expect(inOrder({ id: 'a', recordedAt: late }, one)[0]).toBe(one)
  expect(inOrder({ id: 'c', recordedAt: early }, one)[0]).toBe(one)
})

describe('a swing is taken out by', () => {
  it.each([
    { who: 'who recorded it', accountId: 'coach', scope: 'own', as: 'staff', may: true },
    { who: 'another coach', accountId: 'other', scope: 'own', as: 'staff', may: false },
    { who: 'the owner', accountId: 'other', scope: 'all', as: 'staff', may: true },
    { who: 'a golfer', accountId: 'other', scope: 'own', as: 'golfer', may: false },
  ] as const)('$who: $may', ({ may, ...by }) => {
    expect(mayRemove({ recordedBy: 'coach' }, by)).toBe(may)
  })
})
