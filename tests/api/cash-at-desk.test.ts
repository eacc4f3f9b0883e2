import { describe, expect, it } from 'vitest'
import { openAcademy, signUp, takePlace, type OpenAcademy } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

/** A run for 240.00 that its golfer has promised to pay at the desk. */
async function promised() {
  const academy = await openAcademy(world, { clinic: { payMode: 'desk' } })
  const golfer = await signUp(world)
  const held = await takePlace(golfer, academy, { clinic: academy.clinic })
  const params = { academy: academy.slug, enrolmentId: held.id }
  await golfer.person.must('checkout.at-desk', { params })
  const take = (amountMinor: number) =>
    academy.owner.person.call('checkout.take-cash', { params, body: { amountMinor } })
  return { academy, golfer, params, take }
}

async function owedByTheBooks({ slug, owner }: OpenAcademy): Promise<number> {
  const params = { academy: slug, year: '2031' }
  const { owedAtDeskMinor } = await owner.person.must('ledger.card', { params })
  return owedAtDeskMinor
}

/** What the coach reads beside the only golfer's name, in the run's second session. */
async function isUnpaidInRegister({ slug, owner, clinic }: OpenAcademy): Promise<boolean> {
  const params = { academy: slug, sessionId: clinic.sessions[1]!.id }
  const { rows } = await owner.person.must('register.read', { params })
  expect(rows).toHaveLength(1)
  return rows[0]!.isUnpaid
}

describe('cash at the desk', () => {
  it('is taken once, however often it is pressed', async () => {
    const { academy, take } = await promised()
    const replies = await Promise.all([take(24_000), take(24_000)])
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 422])
    expect(await owedByTheBooks(academy)).toBe(0)
  })

  it('may come in parts, and never comes to more than is owed', async () => {
    const { academy, take } = await promised()
    const part = await take(1_000)
    expect(part.answer).toMatchObject({ payment: 'at-desk', owedMinor: 23_000 })
    expect(await owedByTheBooks(academy)).toBe(23_000)
    expect((await take(24_000)).problem?.fields).toHaveProperty('amountMinor')
    expect((await take(0)).problem?.fields).toHaveProperty('amountMinor')
    expect((await take(23_000)).answer).toMatchObject({ payment: 'paid', owedMinor: 0 })
    expect(await owedByTheBooks(academy)).toBe(0)
  })

  it('is refused for a place that was given up', async () => {
    const { academy, golfer, params, take } = await promised()
    await golfer.person.must('checkout.give-up', { params, body: { refundMinor: 0 } })
    expect((await take(24_000)).status).toBe(422)
    expect(await owedByTheBooks(academy)).toBe(0)
  })

  it('is less by a session that was called off', async () => {
    const { academy, golfer, params, take } = await promised()
    const [session] = academy.clinic.sessions
    await academy.owner.person.must('sessions.call-off', {
      params: { academy: academy.slug, sessionId: session!.id },
      body: { reason: 'Lightning' },
    })
    await world.drain()
    expect(await golfer.person.must('enrolments.read', { params })).toMatchObject({
      payment: 'at-desk',
      owedMinor: 21_000,
    })
    expect((await take(24_000)).status).toBe(422)
    expect(await isUnpaidInRegister(academy)).toBe(true)
    expect((await take(21_000)).answer).toMatchObject({ payment: 'paid', owedMinor: 0 })
    expect(await owedByTheBooks(academy)).toBe(0)
    expect(await isUnpaidInRegister(academy)).toBe(false)
  })
})
