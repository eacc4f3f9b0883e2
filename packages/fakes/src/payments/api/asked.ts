import type { Request } from 'express'
import { ProviderError, missing } from '../provider-error'
import type { FakeState } from '../state'
import { readFormBody, type FormValue } from './form-body'

type Form = Record<string, FormValue>

/** A request as the API reads it. */
export interface Asked {
  form: Form
  query: Form
  /** The connected account it is made for; null for the platform's own. */
  account: string | null
  id: string
  expand: string[]
}

export function readAsked(request: Request): Asked {
  const query = readFormBody(request.url.split('?')[1] ?? '')
  const form = readFormBody(typeof request.body === 'string' ? request.body : '')
  const { id } = request.params
  return {
    form,
    query,
    account: request.get('stripe-account') ?? null,
    id: typeof id === 'string' ? id : '',
    expand: [query['expand'], form['expand']].flat().filter((path) => typeof path === 'string'),
  }
}

/** @throws ProviderError where the key is missing or another one; a key is never repeated whole. */
export function checkKey(request: Request, secretKey: string): void {
  const given = request.get('authorization')?.replace(/^Bearer /, '')
  if (given === secretKey) return
  const message = given
    ? `Invalid API Key provided: ****${given.slice(-4)}`
    : 'You did not provide an API key.'
  throw new ProviderError(401, message)
}

/** @throws ProviderError for an account that the platform is not connected to. */
export function checkAccount({ accounts }: FakeState, account: string | null): void {
  if (account === null || accounts[account]) return
  throw new ProviderError(403, `The provided key does not have access to account '${account}'.`, {
    code: 'account_invalid',
  })
}

/** @throws ProviderError for a parameter that the stand-in would have to leave unheard. */
export function checkKnown(form: Form, known: readonly string[]): void {
  const unknown = Object.keys(form).find((name) => name !== 'expand' && !known.includes(name))
  if (unknown === undefined) return
  throw new ProviderError(400, `Received unknown parameter: ${unknown}`, {
    code: 'parameter_unknown',
    param: unknown,
  })
}

/** A record of the account that asks. @throws ProviderError where there is none of theirs. */
export function own<T extends { account: string | null }>(
  { account }: Asked,
  id: string,
  { records, what }: { records: Readonly<Record<string, T>>; what: string },
): T {
  const found = records[id]
  if (found?.account !== account) throw missing(what, id)
  return found
}

/** The records of the account that asks, in the order they were made in. */
export const ownOf = <T extends { account: string | null }>(
  { account }: Asked,
  records: Readonly<Record<string, T>>,
): T[] => Object.values(records).filter((record) => record.account === account)
