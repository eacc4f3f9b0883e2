import type { Sent } from '@marram/contract'
import { beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { SLICE, STRAIGHT, openBench, tableOf, wrist, type Bench } from '../support/swings'
import { useWorld } from '../support/use-world'

const world = await useWorld()

let bench: Bench
beforeAll(async () => {
  bench = await openBench(world)
})
beforeEach(() => world.clock.moveBy(60_000))

describe('a target', () => {
  const OPEN = { flexionDeg: null, ulnarDeg: null }
  const set = (body: Sent<'targets.set', 'body'>) => {
    const { coach, inAcademy, childId: golferId } = bench
    return coach.person.must('targets.set', { params: inAcademy({ golferId }), body })
  }

  it('is what a swing is held against: its club’s own before the one for all', async () => {
    const { recorded, childId, guardian, inAcademy } = bench
    const { id: swingId } = await recorded({ wrist: STRAIGHT }, { of: childId })
    expect((await bench.compare(swingId, 'target')).problem?.detail).toBe(
      'There is no such target.',
    )

    await set({ club: null, wrist: { address: OPEN, top: OPEN, impact: wrist(20, 0) } })
    const general = await bench.compared(swingId, 'target')
    expect(general).toMatchObject({
      from: { kind: 'target', target: { club: null, setBy: 'A coach' } },
      address: { flexionDeg: null, ulnarDeg: null },
      isComparable: true,
      matchUp: { from: null },
    })
    // [D] 1.96·3 = 5.88 against what has no error: 14 is a change, 2 is not.
    expect(tableOf(general)).toEqual([
      ['impact flexion', 14, true],
      ['impact ulnar', 2, false],
    ])
    expect(general.differences?.[0]?.leastDeg).toBeCloseTo(5.88, 2)
    expect(general.workedOut?.flight.from.rises).toBe('always')

    const own = { address: wrist(20, 5), top: OPEN, impact: { flexionDeg: 0, ulnarDeg: null } }
    const { targets } = await set({ club: '7-iron', wrist: own })
    expect(targets.map(({ club }) => club)).toEqual([null, '7-iron'])
    const strict = await bench.compared(swingId, 'target')
    expect(strict).toMatchObject({ whyNot: ['address'], address: { flexionDeg: -10 } })

    const params = inAcademy({ golferId: childId })
    expect(await guardian.person.must('targets.read-mine', { params })).toEqual({ targets })
    const query = { with: 'target' }
    const mine = { params: inAcademy({ swingId }), query }
    const { to, ...rest } = await guardian.person.must('swings.compare-mine', mine)
    expect(to.mayRemove).toBe(false)
    expect(strict).toMatchObject(rest)
  })

  it('that says nothing of impact leaves nothing to work out', async () => {
    const { recorded, childId } = bench
    const { id } = await recorded({ wrist: STRAIGHT, club: 'driver' }, { of: childId })
    await set({ club: 'driver', wrist: { address: OPEN, top: wrist(30, -15), impact: OPEN } })
    const { workedOut, isComparable } = await bench.compared(id, 'target')
    expect({ workedOut, isComparable }).toEqual({ workedOut: null, isComparable: true })
  })

  it('is replaced by the next for the same club, and taken back when every angle is open', async () => {
    await set({ club: '9-iron', wrist: { address: OPEN, top: OPEN, impact: wrist(5, 0) } })
    const again = { address: OPEN, top: OPEN, impact: wrist(2, 0) }
    const { targets } = await set({ club: '9-iron', wrist: again })
    const ofClub = targets.filter(({ club }) => club === '9-iron')
    expect(ofClub.map(({ wrist: aimed }) => aimed)).toEqual([again])
    const open = await set({ club: '9-iron', wrist: { address: OPEN, top: OPEN, impact: OPEN } })
    expect(open.targets.map(({ club }) => club)).not.toContain('9-iron')
  })
})

describe('how an academy reads swings', () => {
  const START = {
    toleranceDeg: 3,
    errorDeg: { sensor: 3, camera: 5, goniometer: 6, eye: 10 },
    matchUp: { extensionOutDeg: 20, radialBackDeg: 15 },
  }

  it('starts as in every academy, and changes by what the owner changes', async () => {
    const { academy, coach, inAcademy, recorded } = bench
    const params = inAcademy()
    const read = () => coach.person.must('coaching-settings.read', { params })
    const change = (body: object) =>
      academy.owner.person.must('coaching-settings.change', { params, body })
    expect(await read()).toEqual(START)
    expect(await change({})).toEqual(START)

    const [earlier, later] = await bench.twoSwings({ wrist: SLICE }, { wrist: STRAIGHT })
    await change({ errorDeg: { sensor: 4.5 } })
    await change({ toleranceDeg: 1.5, matchUp: { radialBackDeg: 9 } })
    const changed = {
      toleranceDeg: 1.5,
      errorDeg: { ...START.errorDeg, sensor: 4.5 },
      matchUp: { extensionOutDeg: 20, radialBackDeg: 9 },
    }
    expect(await read()).toEqual(changed)
    expect(await recorded()).toMatchObject({ errorDeg: 4.5 })

    const comparison = await bench.compared(later, earlier)
    expect(comparison).toMatchObject({
      // What was recorded before keeps the error it was recorded with.
      to: { errorDeg: 3 },
      whyNot: ['address'],
      address: { flexionDeg: -2, toleranceDeg: 1.5 },
      matchUp: { from: { isRadialBack: true } },
    })
    await change(START)
  })

  it('is the owner’s to change', async () => {
    const { coach, inAcademy } = bench
    const body = { toleranceDeg: 5 }
    const reply = await coach.person.call('coaching-settings.change', { params: inAcademy(), body })
    expect(reply.problem?.code).toBe('not-allowed')
  })

  it('has its limits', async () => {
    const { academy, inAcademy } = bench
    const body = { errorDeg: { eye: 0 }, toleranceDeg: 15.1 }
    const params = inAcademy()
    const reply = await academy.owner.person.call('coaching-settings.change', { params, body })
    expect(reply.problem?.fields).toEqual({
      'errorDeg.eye': 'A reading errs by 0.1° to 30°.',
      toleranceDeg: 'From 0° to 15°.',
    })
  })
})
