import { beforeEach, describe, expect, it } from 'vitest'
import { asSuperuser, readBooks } from '../support/books'
import {
  joinStaff,
  openAcademy,
  pay,
  signUp,
  takePlace,
  type EnrolmentView,
  type OpenAcademy,
  type SignedUp,
} from '../support/builders'
import { tellAgain } from '../support/outbox'
import { useWorld } from '../support/use-world'
import { WORLD_BEGINS } from '../support/world'

const world = await useWorld()

type Mark = 'present' | 'late' | 'absent' | 'excused'

const MINUTE_MS = 60_000
const HOUR_MS = 60 * MINUTE_MS
/** Two shares of a run for 240.00 and one session for 35.00, each net of 9 % tax. */
const NET_OF_SESSION = 2_753 + 2_753 + 3_211

let academy: OpenAcademy
let coach: SignedUp
let params: { academy: string; sessionId: string }
let startsAt: number
let enrolments: EnrolmentView[]

beforeEach(async () => {
  world.clock.moveTo(WORLD_BEGINS)
  academy = await openAcademy(world)
  coach = await joinStaff(world, academy, { role: 'coach', coachId: academy.coach.id })
  const [session] = academy.clinic.sessions
  params = { academy: academy.slug, sessionId: session!.id }
  startsAt = Date.parse(session!.startsAt)
  enrolments = []
  for (const sessionId of [undefined, undefined, session!.id]) {
    const golfer = await signUp(world)
    const what = { clinic: academy.clinic, ...(sessionId ? { sessionId } : {}) }
    const held = await takePlace(golfer, academy, what)
    enrolments.push(await pay(world, golfer, { academy, enrolment: held }))
  }
})

const moveTo = (ms: number) => world.clock.moveTo(new Date(startsAt + ms))
const placeIds = () => enrolments.map(({ places }) => places[0]!.id)

const press = (placeId: string, mark: Mark | null, by = coach) =>
  by.person.call('register.mark', { params: { ...params, placeId }, body: { mark } })

/** A press that a phone made at a moment, given from the session's start, and sends now. */
async function pressedAt(ms: number, mark: Mark | null): Promise<Mark | null> {
  const placeId = placeIds()[0]!
  const body = { mark, markedAt: new Date(startsAt + ms).toISOString() }
  return (await coach.person.must('register.mark', { params: { ...params, placeId }, body })).mark
}

async function markAll(...marks: [Mark, Mark, Mark]): Promise<void> {
  for (const [index, placeId] of placeIds().entries()) {
    expect((await press(placeId, marks[index]!)).status).toBe(200)
  }
}

const close = (revision: number) =>
  coach.person.call('register.close', { params, body: { revision } })
const reopen = (revision: number) =>
  coach.person.call('register.reopen', { params, body: { revision } })

describe('marks', () => {
  it('count by the last press, and every press is kept', async () => {
    moveTo(0)
    const [placeId = ''] = placeIds()
    for (const mark of ['present', 'late', null, 'absent'] as const) await press(placeId, mark)

    const { rows } = await coach.person.must('register.read', { params })
    expect(rows.find((row) => row.placeId === placeId)).toMatchObject({ mark: 'absent' })
    const kept = await asSuperuser(world, async (db) => {
      const history = await db('markHistory').where({ placeId }).orderBy('id')
      return (history as { mark: Mark | null }[]).map(({ mark }) => mark)
    })
    expect(kept.toSorted()).toEqual(['present', 'late', null, 'absent'].toSorted())
  })

  it('count by when they were pressed, not by when they arrive', async () => {
    moveTo(10 * MINUTE_MS)
    expect(await pressedAt(5 * MINUTE_MS, 'present')).toBe('present')
    // Held up without signal while the other was made and sent.
    expect(await pressedAt(5 * MINUTE_MS - 1, 'absent')).toBe('present')
    expect(await pressedAt(5 * MINUTE_MS, 'late')).toBe('late')
    expect(await pressedAt(6 * MINUTE_MS, null)).toBe(null)
    expect(await pressedAt(6 * MINUTE_MS - 1, 'excused')).toBe(null)
  })

  it('count no later than they arrive, by a phone whose clock is ahead', async () => {
    moveTo(10 * MINUTE_MS)
    expect(await pressedAt(24 * HOUR_MS, 'absent')).toBe('absent')
    moveTo(11 * MINUTE_MS)
    expect(await pressedAt(11 * MINUTE_MS, 'present')).toBe('present')
  })

  it.each([
    { when: 'an hour and a millisecond before', ms: -HOUR_MS - 1, code: 'register-not-ready' },
    { when: 'an hour before', ms: -HOUR_MS, code: undefined },
    { when: 'hours later', ms: 12 * HOUR_MS, code: undefined },
  ])('$when: $code', async ({ ms, code }) => {
    moveTo(ms)
    expect((await press(placeIds()[0]!, 'present')).problem?.code).toBe(code)
  })

  it('are of this session’s own places, and set by those who teach it', async () => {
    moveTo(0)
    const elsewhere = enrolments[0]!.places[1]!.id
    expect((await press(elsewhere, 'present')).status).toBe(404)
    const other = await joinStaff(world, academy, { role: 'coach' })
    expect((await press(placeIds()[0]!, 'present', other)).status).toBe(403)
    const golfer = await signUp(world)
    expect((await press(placeIds()[0]!, 'present', golfer)).status).toBe(404)
    expect((await press(placeIds()[0]!, 'present', academy.owner)).status).toBe(200)
  })
})

describe('closing', () => {
  it('waits for the beginning and for every mark', async () => {
    moveTo(-1)
    await markAll('present', 'present', 'present')
    expect((await close(0)).problem?.code).toBe('register-not-ready')
    moveTo(0)
    await press(placeIds()[2]!, null)
    expect((await close(0)).problem?.code).toBe('register-not-ready')
    await press(placeIds()[2]!, 'absent')
    expect((await close(0)).answer).toMatchObject({ revision: 1 })
    expect((await press(placeIds()[0]!, 'late')).problem?.code).toBe('register-closed')
  })

  it('earns what the places were sold for, net of tax, whatever their marks', async () => {
    const before = await readBooks(world, academy.slug)
    moveTo(0)
    await markAll('late', 'absent', 'excused')
    await close(0)
    await world.drain()

    const { kinds, balances } = await readBooks(world, academy.slug)
    expect(kinds['register-closed']).toBe(1)
    expect(balances['earned-clinics']).toBe(-NET_OF_SESSION)
    expect(balances['deferred-clinics']).toBe(before.balances['deferred-clinics']! + NET_OF_SESSION)
    expect(balances['tax-owed']).toBe(before.balances['tax-owed'])
  })

  it('happens once, pressed twice or by two at once, and heard twice', async () => {
    moveTo(0)
    await markAll('present', 'present', 'present')
    const replies = await Promise.all([close(0), close(0), close(0)])
    expect(replies.map(({ answer }) => answer.revision)).toEqual([1, 1, 1])
    await world.drain()
    const about = { sessionId: params.sessionId, revision: 1 }
    await tellAgain(world, academy, 'register.closed', about)

    const { kinds, balances } = await readBooks(world, academy.slug)
    expect(kinds['register-closed']).toBe(1)
    expect(balances['earned-clinics']).toBe(-NET_OF_SESSION)
  })
})

describe('opening again', () => {
  it('takes back to the last cent what closing earned, and closing again earns it', async () => {
    const before = await readBooks(world, academy.slug)
    moveTo(0)
    await markAll('present', 'present', 'absent')
    await close(0)
    await world.drain()
    expect((await reopen(1)).answer).toMatchObject({ revision: 1, closedAt: null })
    await world.drain()
    expect((await readBooks(world, academy.slug)).balances).toEqual(before.balances)

    await press(placeIds()[2]!, 'late')
    expect((await close(1)).answer).toMatchObject({ revision: 2 })
    await world.drain()
    const { kinds, balances } = await readBooks(world, academy.slug)
    expect(kinds).toMatchObject({ 'register-closed': 2, 'register-reopened': 1 })
    expect(balances['earned-clinics']).toBe(-NET_OF_SESSION)
  })

  it('comes out the same when the ledger hears of everything only at the end', async () => {
    moveTo(0)
    await markAll('present', 'present', 'present')
    await close(0)
    await reopen(1)
    await close(1)
    await world.drain()

    const { balances } = await readBooks(world, academy.slug)
    expect(balances['earned-clinics']).toBe(-NET_OF_SESSION)
  })

  it('is refused to who looked at another revision', async () => {
    moveTo(0)
    await markAll('present', 'present', 'present')
    expect((await close(1)).problem?.code).toBe('changed-meanwhile')
    await close(0)
    expect((await reopen(0)).problem?.code).toBe('changed-meanwhile')
    await reopen(1)
    expect((await close(0)).problem?.code).toBe('changed-meanwhile')
    await world.drain()
  })
})
