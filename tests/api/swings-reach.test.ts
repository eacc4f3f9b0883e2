import { beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { joinStaff } from '../support/builders'
import { openBench, type Bench } from '../support/swings'
import { useWorld } from '../support/use-world'

const world = await useWorld()

let bench: Bench
beforeAll(async () => {
  bench = await openBench(world)
})
beforeEach(() => world.clock.moveBy(60_000))

describe('who is not concerned finds nothing', () => {
  it('a coach whose sessions the golfer never came to', async () => {
    const otherCoach = await joinStaff(world, bench.academy, { role: 'coach' })
    const { golferId, inAcademy, record, recorded } = bench
    const { id: swingId } = await recorded()
    const { person } = otherCoach
    expect((await record({}, { by: otherCoach })).status).toBe(404)
    const ofGolfer = { params: inAcademy({ golferId }) }
    expect((await person.call('swings.of-golfer', ofGolfer)).status).toBe(404)
    expect((await person.call('targets.read', ofGolfer)).status).toBe(404)
    const ofSwing = { params: inAcademy({ swingId }) }
    const nowhere = await person.call('swings.read', {
      params: inAcademy({ swingId: '01900000-0000-7000-8000-000000000000' }),
    })
    const hidden = await person.call('swings.read', ofSwing)
    expect({ ...hidden.problem, requestId: '' }).toEqual({ ...nowhere.problem, requestId: '' })
    expect((await person.call('swings.remove', ofSwing)).status).toBe(404)
  })

  it('the desk and the bookkeeper', async () => {
    const { academy, golferId, inAcademy } = bench
    for (const role of ['desk', 'bookkeeper'] as const) {
      const { person } = await joinStaff(world, academy, { role })
      const reply = await person.call('swings.of-golfer', { params: inAcademy({ golferId }) })
      expect(reply.problem?.code).toBe('not-allowed')
    }
  })

  it('a guardian, at other than their own children; and they see theirs', async () => {
    const { golferId, guardian, childId, inAcademy, recorded } = bench
    const ofGolfer = await recorded()
    const ofChild = await recorded({}, { of: childId })
    const { person } = guardian
    const read = (swingId: string) =>
      person.call('swings.read-mine', { params: inAcademy({ swingId }) })
    expect((await read(ofChild.id)).answer).toEqual({ ...ofChild, mayRemove: false })
    expect((await read(ofGolfer.id)).status).toBe(404)
    const list = (of: string) => person.call('swings.mine', { params: inAcademy({ golferId: of }) })
    expect((await list(childId)).answer.swings[0]?.id).toBe(ofChild.id)
    expect((await list(golferId)).status).toBe(404)
    const own = { params: inAcademy({ swingId: ofChild.id }), query: { with: ofGolfer.id } }
    expect((await person.call('swings.compare-mine', own)).status).toBe(404)
    const targets = { params: inAcademy({ golferId }) }
    expect((await person.call('targets.read-mine', targets)).status).toBe(404)
  })

  it('a coach, at swings of their own golfers through the roads of golfers', async () => {
    const { coach, inAcademy, recorded } = bench
    const { id: swingId } = await recorded()
    const reply = await coach.person.call('swings.read-mine', { params: inAcademy({ swingId }) })
    expect(reply.status).toBe(404)
  })
})
