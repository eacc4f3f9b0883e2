import type { Knex } from 'knex'
import type { PlainTrx } from '../platform/tenancy/transaction'

export interface Account {
  id: string
  email: string
  emailVerifiedAt: Date | null
  passwordHash: string | null
  name: string
  sessionVersion: number
  failedSignIns: number
  mayTryAt: Date | null
}

export interface AccountLink {
  accountId: string
  purpose: 'verify' | 'reset'
  email: string
  expiresAt: Date
  usedAt: Date | null
}

export async function findAccountById(trx: Knex, id: string): Promise<Account | undefined> {
  return trx('accounts').where({ id }).first<Account | undefined>()
}

export async function findAccountByEmail(trx: Knex, email: string): Promise<Account | undefined> {
  return trx('accounts').where({ email }).first<Account | undefined>()
}

/** Locks an account against others who try it; rows that refer to it go on. */
export async function lockAccountByEmail(
  trx: PlainTrx,
  email: string,
): Promise<Account | undefined> {
  return trx('accounts').where({ email }).forNoKeyUpdate().first<Account | undefined>()
}

export async function findAccountByIdentity(
  trx: Knex,
  identity: { issuer: string; subject: string },
): Promise<Account | undefined> {
  return trx('accounts')
    .join('accountIdentities', 'accountIdentities.accountId', 'accounts.id')
    .where(identity)
    .first('accounts.*')
}

/** Resolves to false when the address was taken in the meantime. */
export async function insertAccount(
  trx: PlainTrx,
  row: {
    id: string
    email: string
    name: string
    passwordHash: string | null
    emailVerifiedAt: Date | null
    createdAt: Date
  },
): Promise<boolean> {
  const inserted = await trx('accounts').insert(row).onConflict('email').ignore().returning('id')
  return inserted.length === 1
}

export async function updateAccount(
  trx: Knex,
  id: string,
  change: Partial<Omit<Account, 'id' | 'email'>>,
): Promise<void> {
  await trx('accounts').where({ id }).update(change)
}

/** Ends every sign-in session of the person at once. */
export async function endSessionsOf(trx: Knex, accountId: string): Promise<void> {
  await trx('accounts').where({ id: accountId }).increment('sessionVersion', 1)
  await trx('signInSessions').where({ accountId }).delete()
}

/** Writes an identity; one that is known already stays whose it is. */
export async function insertIdentity(
  trx: PlainTrx,
  row: { issuer: string; subject: string; accountId: string; createdAt: Date },
): Promise<void> {
  await trx('accountIdentities').insert(row).onConflict(['issuer', 'subject']).ignore()
}

/** Forgets every other way in: identities and unused links. */
export async function forgetOtherWaysIn(trx: PlainTrx, accountId: string): Promise<void> {
  await trx('accountIdentities').where({ accountId }).delete()
  await trx('accountLinks').where({ accountId }).delete()
}

export async function insertLink(
  trx: PlainTrx,
  row: {
    tokenHash: Buffer
    accountId: string
    purpose: 'verify' | 'reset'
    email: string
    expiresAt: Date
    createdAt: Date
  },
): Promise<void> {
  await trx('accountLinks').insert(row)
}

/** Uses a link up, once: undefined when it is unknown, used, or of another purpose. */
export async function useLink(
  trx: PlainTrx,
  link: { tokenHash: Buffer; purpose: 'verify' | 'reset'; now: Date },
): Promise<AccountLink | undefined> {
  const [used] = await trx('accountLinks')
    .where({ tokenHash: link.tokenHash, purpose: link.purpose })
    .whereNull('usedAt')
    .update({ usedAt: link.now })
    .returning<AccountLink[]>('*')
  return used
}
