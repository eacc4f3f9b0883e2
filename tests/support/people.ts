import type { Answer, Role } from '@marram/contract'
import type { Person } from './person'
import type { World } from './world'

export const PASSWORD = 'salt wind and fescue'

type Account = NonNullable<Answer<'session.read'>['account']>

let count = 0
/** A number that nobody has had yet, for addresses and names that must differ. */
export const nextNumber = (): number => (count += 1)

export interface SignedUp {
  person: Person
  account: Account
}

/** Somebody new, with an account; confirmed when the test needs that. */
export async function signUp(
  world: World,
  given: { name?: string; email?: string; isVerified?: boolean } = {},
): Promise<SignedUp> {
  const number = nextNumber()
  const { name = `Golfer ${number}`, email = `golfer-${number}@mail.example` } = given
  const person = world.person()
  const body = { name, email, password: PASSWORD }
  const { account } = await person.must('accounts.sign-up', { body })
  if (!account) throw new Error('signing up signs in')
  if (given.isVerified) await verify(world, person, email)
  return { person, account }
}

/** Confirms an address as a person does: with the link that was mailed to it. */
export async function verify(world: World, person: Person, email: string): Promise<void> {
  await world.drain()
  await person.must('accounts.verify', { body: { token: secretMailedTo(world, email, 'verify') } })
}

/** The secret of the newest link of a kind that was mailed to an address. */
export function secretMailedTo(
  world: World,
  email: string,
  kind: 'verify' | 'reset' | 'invitation',
): string {
  const link = new RegExp(`/${kind}#([A-Za-z0-9_-]{43})`)
  const secrets = world.mail.messagesTo(email).flatMap(({ text }) => link.exec(text)?.[1] ?? [])
  const newest = secrets.at(-1)
  if (!newest) throw new Error(`No such link was mailed to ${email}: ${kind}.`)
  return newest
}

/** Joins the staff as people do: invited by the owner, with the link from the mail. */
export async function joinStaff(
  world: World,
  academy: { slug: string; owner: SignedUp },
  { role, coachId }: { role: Exclude<Role, 'golfer'>; coachId?: string },
): Promise<SignedUp> {
  const joining = await signUp(world, { name: `A ${role}`, isVerified: true })
  const { email } = joining.account
  await academy.owner.person.must('invitations.send', {
    params: { academy: academy.slug },
    body: { email, role, ...(coachId ? { coachId } : {}) },
  })
  await world.drain()
  const token = secretMailedTo(world, email, 'invitation')
  await joining.person.must('invitations.accept', { body: { token } })
  return joining
}
