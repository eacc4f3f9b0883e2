import { describe, expect, it } from 'vitest'
import { PASSWORD, secretMailedTo, signUp, type SignedUp } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

const HOUR_MS = 3_600_000
const NEW_PASSWORD = 'marram holds the dune'
const UNKNOWN = 'A'.repeat(43)

const verify = ({ person }: SignedUp, token: string) =>
  person.call('accounts.verify', { body: { token } })
const isVerified = async ({ person }: SignedUp) =>
  (await person.must('session.read')).account?.isVerified

async function mailVerification(): Promise<{ golfer: SignedUp; token: string }> {
  const golfer = await signUp(world)
  await world.drain()
  return { golfer, token: secretMailedTo(world, golfer.account.email, 'verify') }
}

/** Asks for a new password as somebody does who has forgotten theirs. */
async function mailReset(): Promise<{ golfer: SignedUp; token: string }> {
  const golfer = await signUp(world)
  const { email } = golfer.account
  await world.person().must('accounts.ask-reset', { body: { email } })
  await world.drain()
  return { golfer, token: secretMailedTo(world, email, 'reset') }
}

const reset = (token: string, password = NEW_PASSWORD) =>
  world.person().call('accounts.reset', { body: { token, password } })
const signIn = (email: string, password: string) =>
  world.person().call('session.sign-in', { body: { email, password } })

/** Just before a link ends, at its last moment, and the moment after. */
const around = (lifeMs: number) => [
  { when: 'a millisecond before its end', afterMs: lifeMs - 1, status: 200 },
  { when: 'at its end', afterMs: lifeMs, status: 200 },
  { when: 'a millisecond after its end', afterMs: lifeMs + 1, status: 410 },
]

describe('the link that confirms an address', () => {
  it('works once', async () => {
    const { golfer, token } = await mailVerification()
    expect(await isVerified(golfer)).toBe(false)
    expect((await verify(golfer, token)).answer).toEqual({ email: golfer.account.email })
    expect(await isVerified(golfer)).toBe(true)
    expect((await verify(golfer, token)).problem?.code).toBe('link-not-valid')
  })

  it.each(around(7 * 24 * HOUR_MS))('$when answers $status', async ({ afterMs, status }) => {
    const { golfer, token } = await mailVerification()
    world.clock.moveBy(afterMs)
    expect((await verify(golfer, token)).status).toBe(status)
    expect(await isVerified(golfer)).toBe(status === 200)
  })

  it('works for nobody else, and still works for its own person afterwards', async () => {
    const { golfer, token } = await mailVerification()
    const other = await signUp(world)
    expect((await verify(other, token)).problem?.code).toBe('link-not-valid')
    expect(await isVerified(other)).toBe(false)
    expect((await verify(golfer, token)).status).toBe(200)
  })

  it('is not taken for the other kind', async () => {
    const { golfer, token } = await mailVerification()
    expect((await reset(token)).problem?.code).toBe('link-not-valid')
    const forgotten = await mailReset()
    expect((await verify(forgotten.golfer, forgotten.token)).status).toBe(410)
    expect((await verify(golfer, UNKNOWN)).status).toBe(410)
  })

  it('is mailed again when asked for, and to nobody whose address is confirmed', async () => {
    const { golfer, token } = await mailVerification()
    await golfer.person.must('accounts.send-verification')
    await world.drain()
    expect(secretMailedTo(world, golfer.account.email, 'verify')).not.toBe(token)
    await verify(golfer, token)
    await golfer.person.must('accounts.send-verification')
    await world.drain()
    expect(world.mail.messagesTo(golfer.account.email)).toHaveLength(2)
  })
})

describe('the link that sets a new password', () => {
  it('works once, signs in, and leaves only the new password', async () => {
    const { golfer, token } = await mailReset()
    const { email } = golfer.account
    const person = world.person()
    await person.must('accounts.reset', { body: { token, password: NEW_PASSWORD } })
    expect((await person.must('session.read')).account).toMatchObject({ email, isVerified: true })
    expect((await signIn(email, PASSWORD)).status).toBe(401)
    expect((await signIn(email, NEW_PASSWORD)).status).toBe(200)
    expect((await reset(token, 'a third one altogether')).problem?.code).toBe('link-not-valid')
    expect((await signIn(email, NEW_PASSWORD)).status).toBe(200)
  })

  it.each(around(HOUR_MS))('$when answers $status', async ({ afterMs, status }) => {
    const { golfer, token } = await mailReset()
    world.clock.moveBy(afterMs)
    expect((await reset(token)).status).toBe(status)
    const works = await signIn(golfer.account.email, NEW_PASSWORD)
    expect(works.status).toBe(status === 200 ? 200 : 401)
  })

  it('ends every other session, and every link mailed before', async () => {
    const { golfer, token } = await mailReset()
    const earlier = secretMailedTo(world, golfer.account.email, 'verify')
    await reset(token)
    expect((await golfer.person.must('session.read')).account).toBeNull()
    const again = world.person()
    await again.must('session.sign-in', {
      body: { email: golfer.account.email, password: NEW_PASSWORD },
    })
    expect((await verify({ ...golfer, person: again }, earlier)).status).toBe(410)
  })

  it('ends the wait after wrong passwords', async () => {
    const { golfer, token } = await mailReset()
    const { email } = golfer.account
    for (let time = 0; time < 5; time += 1) await signIn(email, 'wrong every time')
    expect((await signIn(email, PASSWORD)).status).toBe(429)
    await reset(token)
    expect((await signIn(email, NEW_PASSWORD)).status).toBe(200)
  })

  it('cannot be used twice at the same moment', async () => {
    const { token } = await mailReset()
    const both = await Promise.all([reset(token, 'the first of the two'), reset(token)])
    expect(both.map(({ status }) => status).sort()).toEqual([200, 410])
  })

  it('is asked for without a word about whether the address is known', async () => {
    const { account } = await signUp(world)
    const ask = (email: string) => world.person().call('accounts.ask-reset', { body: { email } })
    const known = await ask(account.email)
    const unknown = await ask('nobody-at-all@mail.example')
    expect(unknown).toEqual(known)
    await world.drain()
    expect(world.mail.messagesTo('nobody-at-all@mail.example')).toEqual([])
  })

  it('holds a secret that the database does not know', async () => {
    const { token } = await mailReset()
    const rows = await world.services.db('accountLinks').select()
    expect(rows.length).toBeGreaterThan(0)
    expect(JSON.stringify(rows)).not.toContain(token)
    expect(JSON.stringify(rows)).not.toContain(Buffer.from(token).toString('hex'))
  })
})
