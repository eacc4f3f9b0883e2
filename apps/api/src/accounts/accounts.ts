import { Problem } from '../platform/errors'
import { hashSecret, newId, newSecret } from '../platform/ids'
import { invariant } from '../platform/invariant'
import type { Services } from '../platform/services'
import { inPlain, type PlainTrx } from '../platform/tenancy/transaction'
import { hashPassword, isPassword } from './passwords'
import {
  endSessionsOf,
  findAccountByEmail,
  findAccountById,
  findAccountByIdentity,
  forgetOtherWaysIn,
  insertAccount,
  insertIdentity,
  insertLink,
  lockAccountByEmail,
  updateAccount,
  useLink,
  type Account,
} from './queries'
import { LINK_HOURS, isExpired, nextTryAt } from './rules'

const wrongCredentials = () =>
  new Problem('wrong-credentials', 'The address and the password do not fit together.')

/**
 * Signs up, or signs in when the address has an account and the password is its own (the same form
 * serves both). Resolves to the account's id. Throws `wrong-credentials`.
 */
export async function signUp(
  services: Services,
  wanted: { name: string; email: string; password: string },
): Promise<string> {
  const existing = await findAccountByEmail(services.db, wanted.email)
  if (existing) return signIn(services, wanted)
  const passwordHash = await hashPassword(wanted.password)
  const now = services.clock.now()
  const id = newId(now)
  const isNew = await inPlain(services.db, async (trx) => {
    const { name, email } = wanted
    const row = { id, name, email, passwordHash, emailVerifiedAt: null, createdAt: now }
    if (!(await insertAccount(trx, row))) return false
    await services.outbox.emit(trx, 'account.link-wanted', { accountId: id, purpose: 'verify' })
    return true
  })
  return isNew ? id : signIn(services, wanted)
}

/** Checks a password, slowing down after failures. Resolves to the account's id. */
export async function signIn(
  { db, clock }: Services,
  { email, password }: { email: string; password: string },
): Promise<string> {
  const now = clock.now()
  const account = await inPlain(db, (trx) => countTry(trx, { email, now }))
  const fits = await isPassword(account?.passwordHash ?? null, password)
  if (!account || !fits) throw wrongCredentials()
  await updateAccount(db, account.id, { failedSignIns: 0, mayTryAt: null })
  return account.id
}

/**
 * Counts a try as a failure before the password is looked at, and lets a good one take it back:
 * guesses that come at the same moment are counted each.
 */
async function countTry(
  trx: PlainTrx,
  { email, now }: { email: string; now: Date },
): Promise<Account | undefined> {
  const account = await lockAccountByEmail(trx, email)
  if (!account) return undefined
  if (account.mayTryAt && now < account.mayTryAt) {
    const seconds = Math.ceil((account.mayTryAt.getTime() - now.getTime()) / 1000)
    throw new Problem('too-many-attempts', `Please wait ${seconds} seconds and try again.`)
  }
  const failedSignIns = account.failedSignIns + 1
  const mayTryAt = nextTryAt(failedSignIns, now)
  await updateAccount(trx, account.id, { failedSignIns, mayTryAt })
  return account
}

export async function signOutEverywhere({ db }: Services, accountId: string): Promise<void> {
  await inPlain(db, (trx) => endSessionsOf(trx, accountId))
}

/** Asks for the verification mail again. */
export async function askVerification(services: Services, accountId: string): Promise<void> {
  await inPlain(services.db, (trx) =>
    services.outbox.emit(trx, 'account.link-wanted', { accountId, purpose: 'verify' }),
  )
}

/** Asks for a reset mail. Says nothing about whether the address is known. */
export async function askReset(services: Services, email: string): Promise<void> {
  await inPlain(services.db, async (trx) => {
    const account = await findAccountByEmail(trx, email)
    if (!account) return
    const wanted = { accountId: account.id, purpose: 'reset' } as const
    await services.outbox.emit(trx, 'account.link-wanted', wanted)
  })
}

export interface AccountLinkToSend {
  account: Account
  secret: string
}

/** Makes the link that a mail carries; called when the mail is written, so no secret ever waits. */
export async function makeLink(
  { db, clock }: Services,
  { accountId, purpose }: { accountId: string; purpose: 'verify' | 'reset' },
): Promise<AccountLinkToSend | null> {
  return inPlain(db, async (trx) => {
    const account = await findAccountById(trx, accountId)
    if (!account || (purpose === 'verify' && account.emailVerifiedAt)) return null
    const secret = newSecret()
    const now = clock.now()
    await insertLink(trx, {
      tokenHash: hashSecret(secret),
      accountId,
      purpose,
      email: account.email,
      expiresAt: new Date(now.getTime() + LINK_HOURS[purpose] * 3_600_000),
      createdAt: now,
    })
    return { account, secret }
  })
}

/**
 * Confirms an address. Only the person who is signed in to the account can: somebody who opened an
 * account with another's address must not have it confirmed by that other person's press.
 */
export async function verifyEmail(
  { db, clock }: Services,
  { secret, accountId }: { secret: string; accountId: string },
): Promise<{ email: string }> {
  return inPlain(db, async (trx) => {
    const link = await takeLink(trx, { secret, purpose: 'verify', now: clock.now() })
    if (link.accountId !== accountId) {
      throw new Problem('link-not-valid', 'Sign in to the account that this mail is about first.')
    }
    await updateAccount(trx, accountId, { emailVerifiedAt: clock.now() })
    return { email: link.email }
  })
}

/**
 * Sets a new password. The mailbox proves the person, so everything that anybody else may have
 * left behind goes: sign-in sessions, identities and open links.
 */
export async function resetPassword(
  { db, clock }: Services,
  { secret, password }: { secret: string; password: string },
): Promise<{ email: string; accountId: string }> {
  const passwordHash = await hashPassword(password)
  return inPlain(db, async (trx) => {
    const now = clock.now()
    const { accountId, email } = await takeLink(trx, { secret, purpose: 'reset', now })
    await forgetOtherWaysIn(trx, accountId)
    await endSessionsOf(trx, accountId)
    await updateAccount(trx, accountId, {
      passwordHash,
      emailVerifiedAt: now,
      failedSignIns: 0,
      mayTryAt: null,
    })
    return { email, accountId }
  })
}

async function takeLink(
  trx: PlainTrx,
  wanted: { secret: string; purpose: 'verify' | 'reset'; now: Date },
) {
  const link = await useLink(trx, { ...wanted, tokenHash: hashSecret(wanted.secret) })
  if (!link || isExpired(link.expiresAt, wanted.now)) {
    throw new Problem('link-not-valid', 'This link was used or is too old. Ask for a new one.')
  }
  return link
}

export interface ProviderProfile {
  issuer: string
  subject: string
  email: string | null
  isEmailVerified: boolean
  name: string
}

/**
 * Signs in with an identity provider. An identity is known by issuer and subject; an address only
 * counts when the provider has verified it. An account that never confirmed the address passes to
 * the person who has, with nothing of its first owner left in it.
 */
export async function signInWithProvider(
  { db, clock }: Services,
  profile: ProviderProfile,
): Promise<string> {
  return inPlain(db, async (trx) => {
    const known = await findAccountByIdentity(trx, pick(profile))
    if (known) return known.id
    if (!profile.email || !profile.isEmailVerified) {
      throw new Problem(
        'wrong-credentials',
        'That sign-in has no confirmed address. Use your e-mail and a password instead.',
      )
    }
    const now = clock.now()
    const email = profile.email.toLowerCase()
    const row = { id: newId(now), email, name: profile.name, passwordHash: null }
    // Does nothing where the address has an account already.
    await insertAccount(trx, { ...row, emailVerifiedAt: now, createdAt: now })
    const account = await lockAccountByEmail(trx, email)
    invariant(account, 'the address has an account by now')
    const { id: accountId } = account
    if (!account.emailVerifiedAt) {
      await forgetOtherWaysIn(trx, accountId)
      await endSessionsOf(trx, accountId)
      const mine = { passwordHash: null, emailVerifiedAt: now, name: profile.name }
      await updateAccount(trx, accountId, mine)
    }
    await insertIdentity(trx, { ...pick(profile), accountId, createdAt: now })
    return accountId
  })
}

const pick = ({ issuer, subject }: ProviderProfile) => ({ issuer, subject })

export { findAccountById, type Account } from './queries'
export { LINK_HOURS } from './rules'
