import { beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { asSuperuser } from '../support/books'
import { openBench, swingFields, wrist, type Bench } from '../support/swings'
import { useWorld } from '../support/use-world'

const world = await useWorld()

let bench: Bench
beforeAll(async () => {
  bench = await openBench(world)
})
beforeEach(() => world.clock.moveBy(60_000))

const listed = (query: Record<string, string> = {}) => {
  const { coach, inAcademy, golferId } = bench
  return coach.person.must('swings.of-golfer', { params: inAcademy({ golferId }), query })
}

describe('a swing', () => {
  it('is recorded as the coach reads it, with who and when and in which session', async () => {
    const { academy, coach, golferId, inAcademy, recorded } = bench
    const sessionId = academy.clinic.sessions[0]!.id
    const swing = await recorded({ sessionId, note: 'Backs up.', delivery: { pathDeg: -4.5 } })
    expect(swing).toEqual({
      id: expect.stringMatching(/^[0-9a-f-]{36}$/) as string,
      golferId,
      sessionId,
      recordedAt: world.clock.now().toISOString(),
      recordedBy: 'A coach',
      mayRemove: true,
      club: '7-iron',
      method: 'sensor',
      errorDeg: 3,
      wrist: {
        address: { flexionDeg: -28, ulnarDeg: 5 },
        top: { flexionDeg: -44, ulnarDeg: -15 },
        impact: { flexionDeg: -18, ulnarDeg: -5 },
      },
      ball: {
        start: 'pulled',
        curve: 'slice',
        height: 'high',
        contact: 'fat',
        distanceMetres: 112,
      },
      delivery: { faceDeg: null, pathDeg: -4.5, attackDeg: null, speedMps: null },
      note: 'Backs up.',
    })
    const params = inAcademy({ swingId: swing.id })
    expect(await coach.person.must('swings.read', { params })).toEqual(swing)
  })

  it('needs no more than the club, the method and the wrist', async () => {
    const { coach, golferId, inAcademy } = bench
    const { club, method, wrist: track } = swingFields()
    const body = { club, method, wrist: track }
    const params = inAcademy({ golferId })
    const swing = await coach.person.must('swings.record', { params, body })
    expect(swing.ball).toEqual({
      start: null,
      curve: null,
      height: null,
      contact: null,
      distanceMetres: null,
    })
    expect(swing).toMatchObject({ sessionId: null, note: '' })
  })

  it.each([
    ['sensor', 3],
    ['camera', 5],
    ['goniometer', 6],
    ['eye', 10],
  ] as const)('read by %s errs by %d° unless its own error is said', async (method, errorDeg) => {
    const { recorded } = bench
    expect(await recorded({ method })).toMatchObject({ method, errorDeg })
    expect(await recorded({ method, errorDeg: 2.5 })).toMatchObject({ errorDeg: 2.5 })
  })

  it('that is sent again under its own number is recorded once', async () => {
    const { academy, childId, record, recorded } = bench
    const id = '01900000-0000-4000-8000-000000000001'
    const first = await recorded({ id })
    world.clock.moveBy(5_000)
    expect(await recorded({ id })).toEqual(first)
    const { swings } = await listed()
    expect(swings.filter((swing) => swing.id === id)).toHaveLength(1)

    const byOwner = await record({ id }, { by: academy.owner })
    expect(byOwner.problem?.code).toBe('already-there')
    const ofChild = await record({ id }, { of: childId })
    expect(ofChild.problem?.code).toBe('already-there')
  })

  it('is never changed, not even by a slip of ours', async () => {
    const { recorded } = bench
    const { id } = await recorded()
    const change = world.services.db.transaction(async (trx) => {
      await trx.raw(`UPDATE swings SET top_flexion_deg = 0 WHERE id = ?`, [id])
    })
    await expect(change).rejects.toThrow('permission denied')
  })
})

describe('angles', () => {
  const at = (extensionDeg: number, ulnarDeg: number) => ({
    ...swingFields().wrist,
    top: wrist(extensionDeg, ulnarDeg),
  })
  const BEND = 'A wrist reads from 87.5° of extension (-87.5) to 100° of flexion (100).'
  const SIDE =
    'A wrist reads from 25° to the thumb side (-25) to 37.5° to the little-finger side (37.5).'

  it.each([
    { what: 'all extension', track: at(87.5, 0) },
    { what: 'all flexion', track: at(-100, 0) },
    { what: 'all radial', track: at(10, -25) },
    { what: 'all ulnar, in tenths', track: at(0.1, 37.5) },
  ])('are taken to the end of the range: $what', async ({ track }) => {
    const { recorded } = bench
    expect((await recorded({ wrist: track })).wrist).toEqual(track)
  })

  it.each([
    { track: at(87.6, 0), field: 'wrist.top.flexionDeg', sentence: BEND },
    { track: at(-100.1, 0), field: 'wrist.top.flexionDeg', sentence: BEND },
    { track: at(0, -25.1), field: 'wrist.top.ulnarDeg', sentence: SIDE },
    { track: at(0, 37.6), field: 'wrist.top.ulnarDeg', sentence: SIDE },
    { track: at(20.05, 0), field: 'wrist.top.flexionDeg', sentence: 'Tenths at the most.' },
  ])('beyond it are a typing error: $track.top', async ({ track, field, sentence }) => {
    const { record } = bench
    const { status, problem } = await record({ wrist: track })
    expect(status).toBe(422)
    expect(problem?.fields).toEqual({ [field]: sentence })
  })
})

describe('what does not fit is refused beside its field', () => {
  it('a club that nobody has', async () => {
    const { coach, golferId, inAcademy } = bench
    const body = { ...swingFields(), club: '8-wood' as '7-iron' }
    const params = inAcademy({ golferId })
    const { status, problem } = await coach.person.call('swings.record', { params, body })
    expect(status).toBe(422)
    expect(problem?.fields?.['club']).toMatch(/^This should be one of: driver, .*sand-wedge\.$/)
  })

  it('a session in which the golfer has no place', async () => {
    const { academy, childId, record } = bench
    const sessionId = academy.clinic.sessions[1]!.id
    expect((await record({ sessionId }, { of: childId })).status).toBe(200)
    const first = academy.clinic.sessions[0]!.id
    const { status, problem } = await record({ sessionId: first }, { of: childId })
    expect(status).toBe(422)
    expect(problem?.fields).toEqual({ sessionId: 'This golfer has no place in that session.' })
  })

  it('a session that is not there', async () => {
    const { record } = bench
    const sessionId = '01900000-0000-7000-8000-000000000000'
    expect((await record({ sessionId })).problem?.code).toBe('not-found')
  })
})

describe('a list', () => {
  it('is newest first, page by page, without gap or repetition', async () => {
    const { recorded } = bench
    const ids: string[] = []
    for (let count = 0; count < 5; count += 1) {
      // Two of them in the same millisecond.
      if (count !== 2) world.clock.moveBy(1_000)
      ids.unshift((await recorded({ club: 'sand-wedge' })).id)
    }
    const pages: string[][] = []
    for (let before: string | null = ''; before !== null;) {
      const query = { club: 'sand-wedge', limit: '2', ...(before ? { before } : {}) }
      const { swings, next } = await listed(query)
      pages.push(swings.map(({ id }) => id))
      before = next
    }
    expect(pages.map(({ length }) => length)).toEqual([2, 2, 1])
    expect(pages.flat().toSorted()).toEqual(ids.toSorted())
    expect([pages[0]![0], pages[2]![0]]).toEqual([ids[0], ids[4]])
  })

  it.each(['0', '101', '-1', '1e1', 'all'])('takes no limit of %s', async (limit) => {
    const { coach, golferId, inAcademy } = bench
    const params = inAcademy({ golferId })
    const reply = await coach.person.call('swings.of-golfer', { params, query: { limit } })
    expect(reply.problem?.fields).toHaveProperty('limit')
  })

  it("shows nothing before another golfer's swing", async () => {
    const { childId, recorded } = bench
    const { id: before } = await recorded({}, { of: childId })
    expect(await listed({ before })).toEqual({ swings: [], next: null })
  })
})

describe('a swing that was taken out', () => {
  it('leaves every list, and its row stays with who took it out', async () => {
    const { coach, golfer, golferId, inAcademy, record, recorded } = bench
    const kept = await recorded()
    const { id: swingId } = await recorded()
    const params = inAcademy({ swingId })
    await coach.person.must('swings.remove', { params })

    const { swings } = await listed()
    expect(swings.map(({ id }) => id)).not.toContain(swingId)
    const ofGolfer = { params: inAcademy({ golferId }) }
    const mine = await golfer.person.must('swings.mine', ofGolfer)
    expect(mine.swings.map(({ id }) => id)).not.toContain(swingId)
    expect((await coach.person.call('swings.read', { params })).status).toBe(404)
    expect((await golfer.person.call('swings.read-mine', { params })).status).toBe(404)
    expect((await coach.person.call('swings.remove', { params })).status).toBe(404)
    const compared = { params: inAcademy({ swingId: kept.id }), query: { with: swingId } }
    expect((await coach.person.call('swings.compare', compared)).status).toBe(404)
    expect((await record({ id: swingId })).problem?.code).toBe('already-there')

    const rows: unknown[] = await asSuperuser(world, (db) => db('swings').where({ id: swingId }))
    expect(rows).toMatchObject([{ removedAt: world.clock.now(), removedBy: coach.account.id }])
  })

  it('was taken out by who recorded it, or by the owner', async () => {
    const { academy, coach, inAcademy, record, recorded } = bench
    const byOwner = await record({}, { by: academy.owner })
    const params = inAcademy({ swingId: byOwner.answer.id })
    const shown = await coach.person.must('swings.read', { params })
    expect(shown.mayRemove).toBe(false)
    const reply = await coach.person.call('swings.remove', { params })
    expect(reply.problem?.code).toBe('not-allowed')
    const { id } = await recorded()
    await academy.owner.person.must('swings.remove', { params: inAcademy({ swingId: id }) })
  })

  it('may still be where a page begins', async () => {
    const { coach, inAcademy, recorded } = bench
    const older = await recorded({ club: 'driver' })
    world.clock.moveBy(1)
    const { id: before } = await recorded({ club: 'driver' })
    await coach.person.must('swings.remove', { params: inAcademy({ swingId: before }) })
    const { swings } = await listed({ before, club: 'driver' })
    expect(swings[0]).toEqual(older)
  })
})
