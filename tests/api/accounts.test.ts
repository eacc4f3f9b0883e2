import { describe, expect, it } from 'vitest'
import { PASSWORD, nextNumber, signUp } from '../support/builders'
import type { Person } from '../support/person'
import { useWorld } from '../support/use-world'

const world = await useWorld()

const WRONG = 'not the password at all'
const newEmail = () => `person-${nextNumber()}@mail.example`
const signIn = (person: Person, email: string, password = PASSWORD) =>
  person.call('session.sign-in', { body: { email, password } })
const whoIs = async (person: Person) => (await person.must('session.read')).account?.email ?? null

/** Another browser that has the same cookies: somebody who got hold of the session. */
function copyOf(person: Person): Person {
  const copy = world.person()
  copy.putCookie('marram', person.cookie('marram') ?? '')
  return copy
}

describe('signing up', () => {
  it('makes an account, signs in and asks to confirm the address', async () => {
    const email = newEmail()
    const person = world.person()
    const body = { name: 'Fionn Marsh', email: ` ${email.toUpperCase()} `, password: PASSWORD }
    const { account } = await person.must('accounts.sign-up', { body })
    expect(account).toMatchObject({ name: 'Fionn Marsh', email, isVerified: false })
    await world.drain()
    const [mail, ...others] = world.mail.messagesTo(email)
    expect(mail?.subject).toBe('Please confirm your e-mail address')
    expect(others).toEqual([])
  })

  it('signs in whoever has the account and its password already', async () => {
    const { account } = await signUp(world)
    const body = { name: 'Another Name', email: account.email, password: PASSWORD }
    const again = await world.person().must('accounts.sign-up', { body })
    expect(again.account).toMatchObject({ id: account.id, name: account.name })
  })

  it('refuses an address that is taken, and a password that is short', async () => {
    const { account } = await signUp(world)
    const taken = { name: 'X', email: account.email, password: WRONG }
    const refused = await world.person().call('accounts.sign-up', { body: taken })
    expect(refused.problem?.code).toBe('wrong-credentials')
    const short = { name: 'X', email: newEmail(), password: 'eleven char' }
    const reply = await world.person().call('accounts.sign-up', { body: short })
    expect(reply.problem?.fields).toEqual({ password: 'Twelve characters or more.' })
  })
})

describe('signing in', () => {
  it('knows the person in the next request, by a cookie that scripts cannot read', async () => {
    const { account } = await signUp(world)
    const person = world.person()
    await signIn(person, account.email)
    expect(await whoIs(person)).toBe(account.email)
    expect(person.cookieLine('marram')).toMatch(/; Path=\/; .*HttpOnly; SameSite=Lax$/)
  })

  it('says the same of a wrong password and of an unknown address', async () => {
    const { account } = await signUp(world)
    const wrong = await signIn(world.person(), account.email, WRONG)
    const unknown = await signIn(world.person(), newEmail(), WRONG)
    expect(wrong.status).toBe(401)
    expect({ ...wrong.problem, requestId: '' }).toEqual({ ...unknown.problem, requestId: '' })
  })

  it('gives the session a new id, and the one known before is worth nothing', async () => {
    const { account } = await signUp(world)
    const person = world.person()
    // A visit on the way to an identity provider starts a session before anybody has signed in.
    await person.send('GET', '/auth/google')
    const before = copyOf(person)
    expect(before.cookie('marram')).toBeTruthy()
    await signIn(person, account.email)
    expect(person.cookie('marram')).not.toBe(before.cookie('marram'))
    expect(await whoIs(person)).toBe(account.email)
    expect(await whoIs(before)).toBeNull()
  })

  it('lasts thirty days', async () => {
    const { person, account } = await signUp(world)
    const began = world.clock.now().getTime()
    world.clock.moveTo(new Date(began + 30 * 86_400_000 - 1))
    expect(await whoIs(person)).toBe(account.email)
    world.clock.moveTo(new Date(began + 30 * 86_400_000))
    expect(await whoIs(person)).toBeNull()
  })
})

describe('signing out', () => {
  it('ends this session, and no other', async () => {
    const { person, account } = await signUp(world)
    const elsewhere = world.person()
    await signIn(elsewhere, account.email)
    const stolen = copyOf(person)
    await person.must('session.sign-out')
    expect(await whoIs(person)).toBeNull()
    expect(await whoIs(stolen)).toBeNull()
    expect(await whoIs(elsewhere)).toBe(account.email)
  })

  it('ends every session at once when it is everywhere', async () => {
    const { person, account } = await signUp(world)
    const elsewhere = world.person()
    await signIn(elsewhere, account.email)
    await person.must('session.sign-out-everywhere')
    expect(await whoIs(person)).toBeNull()
    expect(await whoIs(elsewhere)).toBeNull()
    await signIn(elsewhere, account.email)
    expect(await whoIs(elsewhere)).toBe(account.email)
  })
})

describe('an account whose password is guessed at', () => {
  const failTimes = async (email: string, times: number) => {
    for (let time = 0; time < times; time += 1) {
      expect((await signIn(world.person(), email, WRONG)).status).toBe(401)
    }
  }

  it('lets four mistakes pass', async () => {
    const { account } = await signUp(world)
    await failTimes(account.email, 4)
    expect((await signIn(world.person(), account.email)).status).toBe(200)
    await failTimes(account.email, 4)
    expect((await signIn(world.person(), account.email)).status).toBe(200)
  })

  it('then takes no try for two seconds, not even the right one, then four, then eight', async () => {
    const { account } = await signUp(world)
    await failTimes(account.email, 4)
    for (const seconds of [2, 4, 8]) {
      await failTimes(account.email, 1)
      expect((await signIn(world.person(), account.email)).problem).toMatchObject({
        code: 'too-many-attempts',
        detail: `Please wait ${seconds} seconds and try again.`,
      })
      world.clock.moveBy(seconds * 1_000 - 1)
      expect((await signIn(world.person(), account.email)).status).toBe(429)
      world.clock.moveBy(1)
    }
    expect((await signIn(world.person(), account.email)).status).toBe(200)
  })

  it('has no more of its guesses looked at when they come at the same moment', async () => {
    const { account } = await signUp(world)
    const guesses = Array.from({ length: 12 }, () => signIn(world.person(), account.email, WRONG))
    const statuses = (await Promise.all(guesses)).map(({ status }) => status)
    expect(statuses.filter((status) => status === 401)).toHaveLength(5)
    expect(statuses.filter((status) => status === 429)).toHaveLength(7)
  })
})
