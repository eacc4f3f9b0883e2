import { describe, expect, it } from 'vitest'
import { asSuperuser } from '../support/books'
import { pay, signUp } from '../support/builders'
import { actMeanwhile } from '../support/meanwhile'
import { useWorld } from '../support/use-world'
import { fillClinic, giveUp, join, look } from './waitlist/queue'

const world = await useWorld()

const HOUR_MS = 60 * 60_000
const subjectsTo = (email: string) => world.mail.messagesTo(email).map(({ subject }) => subject)

describe('the queue', () => {
  it('is first come, first served, and joining again keeps the first place in it', async () => {
    const full = await fillClinic(world, 2)
    const [first, second] = full.others
    expect((await join(full, first!)).answer).toMatchObject({ position: 1, state: 'waiting' })
    world.clock.moveBy(1_000)
    expect((await join(full, second!)).answer).toMatchObject({ position: 2 })
    expect((await join(full, first!)).answer).toMatchObject({ position: 1 })
  })

  it('moves up when somebody leaves', async () => {
    const full = await fillClinic(world, 2)
    const [first, second] = full.others
    const { answer } = await join(full, first!)
    world.clock.moveBy(1_000)
    await join(full, second!)
    const params = { academy: full.academy.slug, entryId: answer.id }
    // Somebody else's entry is nobody's business.
    expect((await second!.person.call('waitlist.leave', { params })).status).toBe(404)
    await first!.person.must('waitlist.leave', { params })

    expect((await look(full, second!)).entry).toMatchObject({ position: 1 })
    await giveUp(world, full)
    expect((await look(full, first!)).enrolment).toBeUndefined()
    expect((await look(full, second!)).entry).toMatchObject({ state: 'offered' })
  })

  it('is not left by somebody who has been offered the place: that is let go', async () => {
    const full = await fillClinic(world, 1)
    const [first] = full.others
    const { answer } = await join(full, first!)
    await giveUp(world, full)
    const params = { academy: full.academy.slug, entryId: answer.id }

    const { problem } = await first!.person.call('waitlist.leave', { params })
    expect(problem).toMatchObject({ code: 'already-decided' })
    expect((await look(full, first!)).entry).toMatchObject({ state: 'offered' })
  })

  it('keeps what became of an entry while its leaving was on the way', async () => {
    const full = await fillClinic(world, 1)
    const [first] = full.others
    const { answer } = await join(full, first!)
    const { id } = answer
    const params = { academy: full.academy.slug, entryId: id }

    const { status } = await actMeanwhile(
      world,
      (trx) => trx('waitlistEntries').where({ id }).update({ state: 'taken' }),
      () => first!.person.call('waitlist.leave', { params }),
    )
    expect(status).toBe(200)
    const stands = await asSuperuser(world, (db) => db('waitlistEntries').where({ id }))
    expect(stands).toMatchObject([{ state: 'taken' }])
  })

  it('is not for those who have the place, nor while there is one', async () => {
    const full = await fillClinic(world, 1)
    const mine = { ...full.owner, golferId: full.enrolment.golfer.id }
    expect((await join(full, mine)).problem?.code).toBe('already-has-place')
    await giveUp(world, full)
    expect((await join(full, full.others[0]!)).problem?.code).toBe('not-on-sale')
  })

  it('takes nobody in for somebody else', async () => {
    const full = await fillClinic(world, 2)
    const [first, second] = full.others
    const impostor = { ...first!, golferId: second!.golferId }
    expect((await join(full, impostor)).status).toBe(404)
  })
})

describe('a freed place', () => {
  it('is offered to the first, at once, so that nobody can snipe it', async () => {
    const full = await fillClinic(world, 2)
    const [first, second] = full.others
    await join(full, first!)
    world.clock.moveBy(1_000)
    await join(full, second!)
    await giveUp(world, full)

    const { entry, enrolment } = await look(full, first!)
    expect(entry).toMatchObject({ state: 'offered', enrolmentId: enrolment?.id })
    expect(enrolment).toMatchObject({ state: 'held', isOffer: true })
    const until = world.clock.now().getTime() + 12 * HOUR_MS
    expect(enrolment?.heldUntil).toBe(new Date(until).toISOString())
    expect(entry?.offeredUntil).toBe(enrolment?.heldUntil)
    expect(subjectsTo(first!.account.email)).toContainEqual(expect.stringMatching(/place/i))
    expect((await look(full, second!)).entry).toMatchObject({ state: 'waiting', position: 1 })

    const passerBy = await signUp(world)
    const snipe = await passerBy.person.call('enrolments.hold', {
      params: { academy: full.academy.slug },
      body: { clinicId: full.clinic.id, for: { kind: 'me' }, hasAcceptedWaiver: true },
    })
    expect(snipe.problem?.code).toBe('session-full')
  })

  it('is taken by paying, like any other hold', async () => {
    const full = await fillClinic(world, 1)
    const [first] = full.others
    await join(full, first!)
    await giveUp(world, full)
    const { enrolment } = await look(full, first!)

    const paid = await pay(world, first!, { academy: full.academy, enrolment: enrolment! })
    expect(paid).toMatchObject({ state: 'confirmed', payment: 'paid', isOffer: true })
    expect((await look(full, first!)).entry).toBeUndefined()
  })

  it('is let pass by letting it go, and goes to the next', async () => {
    const full = await fillClinic(world, 2)
    const [first, second] = full.others
    await join(full, first!)
    world.clock.moveBy(1_000)
    await join(full, second!)
    await giveUp(world, full)
    const { enrolment } = await look(full, first!)
    const params = { academy: full.academy.slug, enrolmentId: enrolment!.id }
    await first!.person.must('enrolments.release', { params })

    expect((await look(full, first!)).entry).toBeUndefined()
    expect((await look(full, first!)).enrolment).toMatchObject({ endedBecause: 'let-go' })
    expect((await look(full, second!)).entry).toMatchObject({ state: 'offered' })
  })
})

describe('the deadline of an offer', () => {
  it.each([
    { when: 'a millisecond before', ms: -1, goesOn: false },
    { when: 'at the deadline', ms: 0, goesOn: false },
    { when: 'a millisecond after', ms: 1, goesOn: true },
  ])('$when', async ({ ms, goesOn }) => {
    const full = await fillClinic(world, 2)
    const [first, second] = full.others
    await join(full, first!)
    world.clock.moveBy(1_000)
    await join(full, second!)
    await giveUp(world, full)
    const { enrolment } = await look(full, first!)
    world.clock.moveTo(new Date(Date.parse(enrolment!.heldUntil!) + ms))

    const params = { academy: full.academy.slug, enrolmentId: enrolment!.id }
    const pressed = await first!.person.call('checkout.start', { params })
    expect(pressed.problem?.code).toBe(goesOn ? 'hold-lapsed' : undefined)
    await world.sweep()
    expect((await look(full, second!)).entry?.state).toBe(goesOn ? 'offered' : 'waiting')
    expect((await look(full, first!)).entry?.state).toBe(goesOn ? undefined : 'offered')
  })

  it('is never past the beginning of what is offered', async () => {
    const full = await fillClinic(world, 1)
    const [first] = full.others
    const [session] = full.clinic.sessions
    await join(full, first!)
    world.clock.moveTo(new Date(Date.parse(session!.startsAt) - 2 * HOUR_MS))
    await giveUp(world, full)

    const { enrolment } = await look(full, first!)
    expect(enrolment?.heldUntil).toBe(session!.startsAt)
  })
})

describe('a run and its sessions', () => {
  it('offers a run only when every session of it has a place', async () => {
    const full = await fillClinic(world, 2)
    const [forRun, forOne] = full.others
    await join(full, forRun!)
    world.clock.moveBy(1_000)
    const third = full.clinic.sessions[2]!.id
    await join(full, forOne!, third)
    await giveUp(world, full)

    // The run came first, and takes all eight; one session of it is not left over for the other.
    expect((await look(full, forRun!)).enrolment?.places).toHaveLength(8)
    expect((await look(full, forOne!)).entry).toMatchObject({ state: 'waiting' })
    const { enrolment } = await look(full, forRun!)
    const params = { academy: full.academy.slug, enrolmentId: enrolment!.id }
    await forRun!.person.must('enrolments.release', { params })
    const { enrolment: one } = await look(full, forOne!)
    expect(one?.places.map(({ sessionId }) => sessionId)).toEqual([third])
  })

  it('offers the rest of a run when the only full session of it is called off', async () => {
    const full = await fillClinic(world, 1)
    const [waits] = full.others
    await join(full, waits!)
    const { academy, clinic } = full
    for (const { id: sessionId } of clinic.sessions.slice(1)) {
      const params = { academy: academy.slug, sessionId }
      await academy.owner.person.must('sessions.change', { params, body: { capacity: 3 } })
    }
    await world.drain()
    expect((await look(full, waits!)).entry).toMatchObject({ state: 'waiting' })

    await academy.owner.person.must('sessions.call-off', {
      params: { academy: academy.slug, sessionId: clinic.sessions[0]!.id },
      body: { reason: 'Lightning' },
    })
    await world.drain()
    expect((await look(full, waits!)).enrolment).toMatchObject({ isOffer: true, kind: 'run' })
    expect((await look(full, waits!)).enrolment?.places).toHaveLength(7)
  })

  it('passes a run by while one of its sessions is taken, and offers that session', async () => {
    const full = await fillClinic(world, 2)
    const [forOne, forRun] = full.others
    const third = full.clinic.sessions[2]!.id
    await join(full, forOne!, third)
    world.clock.moveBy(1_000)
    await join(full, forRun!)
    await giveUp(world, full)

    expect((await look(full, forOne!)).entry).toMatchObject({ state: 'offered' })
    expect((await look(full, forRun!)).entry).toMatchObject({ state: 'waiting' })
    const { enrolment } = await look(full, forOne!)
    const params = { academy: full.academy.slug, enrolmentId: enrolment!.id }
    await forOne!.person.must('enrolments.release', { params })
    expect((await look(full, forRun!)).enrolment).toMatchObject({ isOffer: true, kind: 'run' })
  })
})
