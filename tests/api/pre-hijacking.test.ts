import { SCHEMAS, type RouteKey } from '@marram/contract'
import { beforeEach, describe, expect, it } from 'vitest'
import { nextNumber, secretMailedTo, signUp, type SignedUp } from '../support/builders'
import { signInWithGoogle } from '../support/google'
import type { Person } from '../support/person'
import { useWorld } from '../support/use-world'

/**
 * Somebody prepares an account under another's address before its owner comes, to share it later.
 * The five ways are those of Sudhodanan and Paverd, "Pre-hijacked accounts" (USENIX Security 2022).
 */
const people = Array.from({ length: 20 }, (_, index) => ({
  sub: `victim-${index}`,
  name: `Victim ${index}`,
  email: `victim-${index}@mail.example`,
  isVerified: true,
}))
const forger = { sub: 'forger', name: 'Forger', email: 'forger@mail.example', isVerified: true }
/** At a provider that lets anybody claim any address without confirming it. */
const claim = (email: string, sub: string) => ({ sub, email, name: 'Claimer', isVerified: false })
const claimers = people.map(({ email, sub }) => claim(email, `claims-${sub}`))
const early = claim('comes-later@mail.example', 'claims-early')
const late = claim('was-there-first@mail.example', 'claims-late')

const world = await useWorld({ people: [...people, ...claimers, early, late, forger] })

const ATTACKERS = 'attackers know this one'
const VICTIMS = 'only the victim knows this'

let victim: (typeof people)[number]
let attacker: SignedUp

beforeEach(async () => {
  victim = people[nextNumber() % people.length]!
})

const whoIs = async (person: Person) => (await person.must('session.read')).account
const signIn = (email: string, password: string) =>
  world.person().call('session.sign-in', { body: { email, password } })

/** The attacker opens an account under the victim's address, before the victim ever comes. */
async function prepare(): Promise<SignedUp> {
  const person = world.person()
  const body = { name: 'Not the victim', email: victim.email, password: ATTACKERS }
  const { account } = await person.must('accounts.sign-up', { body })
  expect(account?.isVerified).toBe(false)
  return { person, account: account! }
}

/** The victim finds the account there, and takes it over with the mailbox that is theirs. */
async function recover(): Promise<Person> {
  const person = world.person()
  await person.must('accounts.ask-reset', { body: { email: victim.email } })
  await world.drain()
  const token = secretMailedTo(world, victim.email, 'reset')
  await person.must('accounts.reset', { body: { token, password: VICTIMS } })
  return person
}

describe('the five ways', () => {
  beforeEach(async () => {
    attacker = await prepare()
  })

  it('classic-federated merge: the password goes when the owner comes by Google', async () => {
    const owner = world.person()
    expect(await signInWithGoogle(world, owner, { subject: victim.sub })).toBe('/back')
    expect(await whoIs(owner)).toMatchObject({
      id: attacker.account.id,
      email: victim.email,
      name: victim.name,
      isVerified: true,
      hasPassword: false,
    })
    expect((await signIn(victim.email, ATTACKERS)).status).toBe(401)
    expect(await whoIs(attacker.person)).toBeNull()
  })

  it('classic-federated merge: the form that signs up does not let them in again', async () => {
    await signInWithGoogle(world, world.person(), { subject: victim.sub })
    const body = { name: 'Not the victim', email: victim.email, password: ATTACKERS }
    const again = await world.person().call('accounts.sign-up', { body })
    expect(again.problem?.code).toBe('wrong-credentials')
  })

  it('unexpired session: it ends when the owner sets a password', async () => {
    const elsewhere = world.person()
    const body = { email: victim.email, password: ATTACKERS }
    await elsewhere.must('session.sign-in', { body })
    const owner = await recover()
    expect(await whoIs(attacker.person)).toBeNull()
    expect(await whoIs(elsewhere)).toBeNull()
    expect(await whoIs(owner)).toMatchObject({ email: victim.email, isVerified: true })
    expect((await signIn(victim.email, ATTACKERS)).status).toBe(401)
  })

  it('trojan identifier: a provider met while signed in is not tied to that account', async () => {
    await signInWithGoogle(world, attacker.person, { subject: forger.sub })
    expect(await whoIs(attacker.person)).toMatchObject({ email: forger.email })
    const owner = await recover()
    const later = world.person()
    await signInWithGoogle(world, later, { subject: forger.sub })
    expect((await whoIs(later))?.id).not.toBe((await whoIs(owner))?.id)
  })

  it('trojan identifier: one that was tied all the same goes when the owner comes', async () => {
    const { db } = world.services
    const { id: accountId } = attacker.account
    const planted = { issuer: 'https://accounts.google.com', subject: `trojan-${accountId}` }
    await db('accountIdentities').insert({ ...planted, accountId, createdAt: new Date() })
    await recover()
    expect(await db('accountIdentities').where({ accountId })).toEqual([])
  })

  it('unexpired link: what the attacker had mailed before works no more', async () => {
    await attacker.person.must('accounts.send-verification')
    await world.drain()
    const before = secretMailedTo(world, victim.email, 'verify')
    const owner = await recover()
    const reply = await owner.call('accounts.verify', { body: { token: before } })
    expect(reply.problem?.code).toBe('link-not-valid')
  })

  it('unconfirmed address: the owner cannot be made to confirm it for the attacker', async () => {
    await world.drain()
    const token = secretMailedTo(world, victim.email, 'verify')
    const curious = await signUp(world)
    const reply = await curious.person.call('accounts.verify', { body: { token } })
    expect(reply.problem?.code).toBe('link-not-valid')
    expect(await whoIs(attacker.person)).toMatchObject({ isVerified: false })
  })

  it('non-verifying provider: a claim to the address does not open the account', async () => {
    const claimer = world.person()
    const went = await signInWithGoogle(world, claimer, { subject: `claims-${victim.sub}` })
    expect(went).toBe('/sign-in?google=unconfirmed&to=%2Fback')
    expect(await whoIs(claimer)).toBeNull()
  })
})

describe('non-verifying provider', () => {
  const accountsUnder = (email: string) => world.services.db('accounts').where({ email })

  it('a claim to an address makes no account that its owner would find', async () => {
    const claimer = world.person()
    await signInWithGoogle(world, claimer, { subject: early.sub })
    expect(await whoIs(claimer)).toBeNull()
    expect(await accountsUnder(early.email)).toEqual([])
  })

  it('a claim to an address does not open the account that its owner has confirmed', async () => {
    const owner = await signUp(world, { email: late.email, isVerified: true })
    const claimer = world.person()
    await signInWithGoogle(world, claimer, { subject: late.sub })
    expect(await whoIs(claimer)).toBeNull()
    expect(await whoIs(owner.person)).toMatchObject({ email: late.email })
    const accountId = owner.account.id
    expect(await world.services.db('accountIdentities').where({ accountId })).toEqual([])
  })
})

describe('unexpired change of address', () => {
  it('cannot be: no route changes the address of an account', () => {
    const takingAddresses = (Object.keys(SCHEMAS) as RouteKey[]).filter((key) => {
      const { body } = SCHEMAS[key] as { body?: { shape?: Record<string, unknown> } }
      return Object.keys(body?.shape ?? {}).some((field) => /mail|invite/i.test(field))
    })
    expect(takingAddresses.sort()).toEqual([
      'accounts.ask-reset',
      'accounts.sign-up',
      // A golfer's own entry at an academy, which signs nobody in.
      'coaches.add',
      'golfers.enter',
      'invitations.send',
      'session.sign-in',
    ])
  })
})
