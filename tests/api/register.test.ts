import type { Answer } from '@marram/contract'
import { beforeEach, describe, expect, it } from 'vitest'
import { openAcademy, pay, signUp, takePlace, type OpenAcademy } from '../support/builders'
import { tellAgain } from '../support/outbox'
import { useWorld } from '../support/use-world'
import { WORLD_BEGINS } from '../support/world'

const world = await useWorld()
beforeEach(() => world.clock.moveTo(WORLD_BEGINS))

const RUN_MINOR = 24_000
const DROP_IN_MINOR = 3_500
/** Net of 9 % tax that is included: the eighth of a run, and an evening alone. */
const RUN_SHARE_NET_MINOR = Math.round(RUN_MINOR / 1.09) / 8
const DROP_IN_NET_MINOR = Math.round(DROP_IN_MINOR / 1.09)

interface Evening {
  academy: OpenAcademy
  params: { academy: string; sessionId: string }
  startsAt: Date
}

/** The first evening of a run: one golfer has the run, another came for this evening only. */
async function sellEvening(): Promise<Evening> {
  const academy = await openAcademy(world, { clinic: { startsOnLocal: '2031-03-11' } })
  const { clinic } = academy
  const [first] = clinic.sessions
  if (!first) throw new Error('a clinic has sessions')
  for (const wanted of [{ clinic }, { clinic, sessionId: first.id }]) {
    const golfer = await signUp(world)
    const enrolment = await takePlace(golfer, academy, wanted)
    await pay(world, golfer, { academy, enrolment })
  }
  const params = { academy: academy.slug, sessionId: first.id }
  return { academy, params, startsAt: new Date(first.startsAt) }
}

type Register = Answer<'register.read'>
type Mark = NonNullable<Register['rows'][number]['mark']>

const read = ({ academy, params }: Evening): Promise<Register> =>
  academy.owner.person.must('register.read', { params })

async function press(evening: Evening, row: number, mark: Mark | null) {
  const placeId = (await read(evening)).rows[row]?.placeId ?? ''
  const params = { ...evening.params, placeId }
  return evening.academy.owner.person.call('register.mark', { params, body: { mark } })
}

async function markAll(evening: Evening): Promise<void> {
  await press(evening, 0, 'present')
  await press(evening, 1, 'absent')
}

async function turn(evening: Evening, what: 'close' | 'reopen', revision: number) {
  const { academy, params } = evening
  const reply = await academy.owner.person.call(`register.${what}`, { params, body: { revision } })
  await world.drain()
  return reply
}

/** What the money card says of the clinic in March, the month of its first evening. */
async function march({ academy }: Evening) {
  const params = { academy: academy.slug, year: '2031' }
  const { clinics } = await academy.owner.person.must('ledger.card', { params })
  return clinics.find(({ clinicId }) => clinicId === academy.clinic.id)?.months[2]
}

async function earnedTransfers({ academy }: Evening) {
  const query = { figure: 'earned', year: '2031' }
  const params = { academy: academy.slug }
  return academy.owner.person.must('ledger.transfers', { params, query })
}

describe('marking', () => {
  it('begins an hour before the session', async () => {
    const evening = await sellEvening()
    const opensMs = evening.startsAt.getTime() - 3_600_000
    world.clock.moveTo(new Date(opensMs - 1))
    expect((await press(evening, 0, 'present')).problem?.code).toBe('register-not-ready')
    world.clock.moveTo(new Date(opensMs))
    expect((await press(evening, 0, 'present')).answer.mark).toBe('present')
  })

  it('counts the last press, and takes a mark away again', async () => {
    const evening = await sellEvening()
    world.clock.moveTo(evening.startsAt)
    for (const mark of ['present', 'late', 'excused', 'absent', 'present', null, 'late'] as const) {
      expect((await press(evening, 0, mark)).answer.mark).toBe(mark)
      expect((await read(evening)).rows[0]?.mark).toBe(mark)
    }
    const [pressed, other] = (await read(evening)).rows
    expect(pressed?.markedBy).toBe(evening.academy.owner.account.name)
    expect(pressed?.markedAt).toBe(evening.startsAt.toISOString())
    expect(other).toMatchObject({ mark: null, markedBy: null, markedAt: null })
  })

  it('is for places of this session only', async () => {
    const evening = await sellEvening()
    const other = await sellEvening()
    world.clock.moveTo(evening.startsAt)
    const placeId = (await read(other)).rows[0]?.placeId ?? ''
    const params = { ...evening.params, placeId }
    const { person } = evening.academy.owner
    const reply = await person.call('register.mark', { params, body: { mark: 'present' } })
    expect(reply.problem?.code).toBe('not-found')
  })

  it('ends with closing', async () => {
    const evening = await sellEvening()
    world.clock.moveTo(evening.startsAt)
    await markAll(evening)
    await turn(evening, 'close', 0)
    expect((await press(evening, 0, 'late')).problem?.code).toBe('register-closed')
    expect((await read(evening)).rows[0]?.mark).toBe('present')
  })
})

describe('closing', () => {
  it('waits until the session has begun and everybody is marked', async () => {
    const evening = await sellEvening()
    world.clock.moveTo(new Date(evening.startsAt.getTime() - 1))
    await markAll(evening)
    expect((await turn(evening, 'close', 0)).problem?.code).toBe('register-not-ready')
    world.clock.moveTo(evening.startsAt)
    await press(evening, 1, null)
    expect((await turn(evening, 'close', 0)).problem?.code).toBe('register-not-ready')
    await press(evening, 1, 'excused')
    const { answer } = await turn(evening, 'close', 0)
    expect(answer).toMatchObject({ revision: 1, closedBy: evening.academy.owner.account.name })
    expect(answer.closedAt).toBe(evening.startsAt.toISOString())
  })

  it('earns what was allocated at the sale, net of tax, whatever the marks', async () => {
    const evening = await sellEvening()
    world.clock.moveTo(evening.startsAt)
    await markAll(evening)
    const before = await march(evening)
    expect(before?.earnedMinor).toBe(0)
    await turn(evening, 'close', 0)

    const after = await march(evening)
    const earnedMinor = Math.ceil(RUN_SHARE_NET_MINOR) + DROP_IN_NET_MINOR
    expect(after?.earnedMinor).toBe(earnedMinor)
    expect((before?.toEarnMinor ?? 0) - (after?.toEarnMinor ?? 0)).toBe(earnedMinor)
    const { totalMinor, transfers } = await earnedTransfers(evening)
    expect(totalMinor).toBe(earnedMinor)
    expect(transfers.map(({ what, dayLocal }) => [what, dayLocal])).toEqual([
      ['Register closed, 1 present, 1 absent', '2031-03-11'],
    ])
  })

  it('shows the same on the card of the clinic', async () => {
    const evening = await sellEvening()
    const { academy } = evening
    const params = { academy: academy.slug, clinicId: academy.clinic.id }
    const { money: sold } = await academy.owner.person.must('register.card', { params })
    expect(sold.paidMinor).toBe(RUN_MINOR + DROP_IN_MINOR)
    expect(sold.toEarnMinor + sold.taxMinor).toBe(sold.paidMinor)
    world.clock.moveTo(evening.startsAt)
    await markAll(evening)
    await turn(evening, 'close', 0)
    const { money } = await academy.owner.person.must('register.card', { params })
    expect(money.earnedMinor).toBe((await march(evening))?.earnedMinor)
    expect(money.earnedMinor + money.toEarnMinor + money.taxMinor).toBe(sold.paidMinor)
  })

  it('posts once for a double press, and for a closing that is told twice', async () => {
    const evening = await sellEvening()
    world.clock.moveTo(evening.startsAt)
    await markAll(evening)
    const { academy, params } = evening
    const close = () =>
      academy.owner.person.call('register.close', { params, body: { revision: 0 } })
    const replies = await Promise.all([close(), close()])
    expect(replies.map(({ status, answer }) => [status, answer.revision])).toEqual([
      [200, 1],
      [200, 1],
    ])
    await world.drain()
    const { sessionId } = params
    await tellAgain(world, academy, 'register.closed', { sessionId, revision: 1 })
    expect((await earnedTransfers(evening)).transfers).toHaveLength(1)
  })
})

describe('reopening', () => {
  it('takes back exactly what was earned, and the next closing is a revision of its own', async () => {
    const evening = await sellEvening()
    world.clock.moveTo(evening.startsAt)
    await markAll(evening)
    const before = await march(evening)
    await turn(evening, 'close', 0)
    const closed = await march(evening)
    const { answer: open } = await turn(evening, 'reopen', 1)
    expect(open).toMatchObject({ revision: 1, closedAt: null, closedBy: null })
    expect(await march(evening)).toEqual(before)

    await press(evening, 1, 'late')
    expect((await turn(evening, 'close', 1)).answer.revision).toBe(2)
    expect(await march(evening)).toEqual(closed)
    const { totalMinor, transfers } = await earnedTransfers(evening)
    expect(totalMinor).toBe(closed?.earnedMinor)
    expect(transfers.map(({ what, amountMinor }) => [what, amountMinor])).toEqual([
      ['Register closed, 1 present, 1 absent', totalMinor],
      ['Register opened again', -totalMinor],
      ['Register closed, 1 present, 1 late', totalMinor],
    ])
  })

  it('takes it back once, however often it is pressed or told', async () => {
    const evening = await sellEvening()
    world.clock.moveTo(evening.startsAt)
    await markAll(evening)
    await turn(evening, 'close', 0)
    await turn(evening, 'reopen', 1)
    expect((await turn(evening, 'reopen', 1)).status).toBe(200)
    const { sessionId } = evening.params
    await tellAgain(world, evening.academy, 'register.reopened', { sessionId, revision: 1 })
    expect((await march(evening))?.earnedMinor).toBe(0)
    expect((await earnedTransfers(evening)).transfers).toHaveLength(2)
  })

  it('refuses a press that was made on another revision', async () => {
    const evening = await sellEvening()
    world.clock.moveTo(evening.startsAt)
    await markAll(evening)
    expect((await turn(evening, 'close', 1)).problem?.code).toBe('changed-meanwhile')
    await turn(evening, 'close', 0)
    expect((await turn(evening, 'reopen', 0)).problem?.code).toBe('changed-meanwhile')
    await turn(evening, 'reopen', 1)
    expect((await turn(evening, 'close', 0)).problem?.code).toBe('changed-meanwhile')
  })
})
