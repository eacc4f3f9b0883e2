import { beforeAll, beforeEach, describe, expect, it } from 'vitest'
import {
  SLICE,
  STRAIGHT,
  openBench,
  swingFields,
  tableOf,
  wrist,
  type Bench,
  type NewSwing,
} from '../support/swings'
import { useWorld } from '../support/use-world'

const world = await useWorld()

let bench: Bench
beforeAll(async () => {
  bench = await openBench(world)
})
beforeEach(() => world.clock.moveBy(60_000))

const compare: Bench['compare'] = (...given) => bench.compare(...given)
const compared: Bench['compared'] = (...given) => bench.compared(...given)
const twoSwings: Bench['twoSwings'] = (...given) => bench.twoSwings(...given)

describe('the measured pair', () => {
  it('differs at the top and at impact by more than a sensor errs', async () => {
    const [earlier, later] = await twoSwings({ wrist: SLICE }, { wrist: STRAIGHT })
    const comparison = await compared(later, earlier)
    expect(comparison).toMatchObject({
      from: { kind: 'swing', swing: { id: earlier } },
      to: { id: later },
      address: { flexionDeg: -2, ulnarDeg: 0, toleranceDeg: 3 },
      isComparable: true,
      whyNot: [],
      matchUp: {
        from: { extensionOutDeg: 26, radialBackDeg: 10, isExtensionOut: true, isRadialBack: false },
        to: { extensionOutDeg: 27, radialBackDeg: 17, isExtensionOut: true, isRadialBack: true },
      },
      workedOut: { anchoredTo: 'square', assumed: ['path', 'attack', 'speed'] },
    })
    expect(tableOf(comparison)).toEqual([
      ['address flexion', -2, false],
      ['address ulnar', 0, false],
      ['top flexion', 11, true],
      ['top ulnar', 0, false],
      ['impact flexion', 12, true],
      ['impact ulnar', 7, false],
    ])
    // [D] 1.96·√2·3, to two figures as in the table of Reissner's errors.
    expect(comparison.differences?.[0]?.leastDeg).toBeCloseTo(8.32, 2)
    expect(comparison.differences?.every(({ by }) => by === 'measuring')).toBe(true)
  })

  it('is the same from either end: the earlier stands first', async () => {
    const [earlier, later] = await twoSwings({ wrist: SLICE }, { wrist: STRAIGHT })
    expect(await compared(earlier, later)).toEqual(await compared(later, earlier))
  })

  it('is within the error of a goniometer', async () => {
    const method = 'goniometer'
    const pair = await twoSwings({ wrist: SLICE, method }, { wrist: STRAIGHT, method })
    const { differences } = await compared(...pair)
    expect(differences?.filter(({ isChange }) => isChange)).toEqual([])
  })

  it('flies in bands, from what was measured of the club in either', async () => {
    const delivery = { pathDeg: -2, speedMps: 40 }
    const pair = await twoSwings({ wrist: SLICE, delivery }, { wrist: STRAIGHT })
    const { workedOut } = await compared(...pair)
    expect(workedOut?.assumed).toEqual(['attack'])
    const { from, to } = workedOut!.flight
    // The face is square to a path from outside: the slice is there, in both ball models.
    expect(from.curveMetres.least).toBeGreaterThan(0)
    expect(from.carryMetres.least).toBeLessThan(from.carryMetres.most)
    expect(to.startDeg.least).toBeLessThan(from.startDeg.least)
    const { forearmFixed, leanHeld } = workedOut!.face.to
    expect(forearmFixed.loftDeg).toBeLessThan(leanHeld.loftDeg)
  })
})

describe('not comparable', () => {
  const startingAt = (address: NewSwing['wrist']['address']) => ({
    wrist: { ...STRAIGHT, address },
  })

  it.each([
    { address: wrist(31, 5), isComparable: true },
    { address: wrist(31.1, 5), isComparable: false },
    { address: wrist(28, 8), isComparable: true },
    { address: wrist(28, 8.1), isComparable: false },
  ])('are swings that start at $address: $isComparable', async ({ address, isComparable }) => {
    const pair = await twoSwings({ wrist: SLICE }, startingAt(address))
    const comparison = await compared(...pair)
    expect(comparison).toMatchObject({ isComparable, whyNot: isComparable ? [] : ['address'] })
    expect(comparison.differences === null).toBe(!isComparable)
    expect(comparison.workedOut === null).toBe(!isComparable)
    expect(comparison.matchUp.to.extensionOutDeg).toBe(27)
  })

  it('are swings with two clubs', async () => {
    const pair = await twoSwings({ wrist: SLICE }, { wrist: SLICE, club: 'driver' })
    expect(await compared(...pair)).toMatchObject({ whyNot: ['club'], differences: null })
  })

  it.each([
    { what: 'itself', other: (swingId: string) => Promise.resolve(swingId) },
    {
      what: 'another golfer’s',
      other: async () => (await bench.recorded({}, { of: bench.childId })).id,
    },
  ])('is a swing with $what, which is refused', async ({ other }) => {
    const { id } = await bench.recorded()
    const { status, problem } = await compare(id, await other(id))
    expect(status).toBe(422)
    expect(problem?.fields).toHaveProperty('with')
  })
})

describe('a left-hander’s ball', () => {
  it('flies as a right-hander’s in the mirror, from the same record', async () => {
    const { academy, coach, golferId, inAcademy } = bench
    const delivery = { faceDeg: 3, pathDeg: -2 }
    const pair = await twoSwings({ wrist: SLICE, delivery }, { wrist: STRAIGHT })
    const right = await compared(...pair)
    const change = (hand: 'left' | 'right') =>
      academy.owner.person.must('golfers.change', {
        params: inAcademy({ golferId }),
        body: { hand },
      })
    await change('left')
    const left = await compared(...pair)
    const swing = await coach.person.must('swings.read', {
      params: inAcademy({ swingId: pair[0] }),
    })
    await change('right')

    expect(swing.delivery).toMatchObject(delivery)
    expect(left.differences).toEqual(right.differences)
    expect(left.workedOut?.face).toEqual(right.workedOut?.face)
    const [seen, turned] = [right.workedOut!.flight.from, left.workedOut!.flight.from]
    expect(seen.curveMetres.least).toBeGreaterThan(0)
    expect(turned.curveMetres).toEqual({
      least: -seen.curveMetres.most,
      most: -seen.curveMetres.least,
    })
    expect(turned.carryMetres).toEqual(seen.carryMetres)
  })
})

it('compares nothing of another academy', async () => {
  const theirs = await openBench(world)
  const { id: theirSwing } = await theirs.recorded(swingFields())
  const { id } = await bench.recorded()
  expect((await compare(id, theirSwing)).status).toBe(404)
  expect((await compare(theirSwing, id)).status).toBe(404)
})
