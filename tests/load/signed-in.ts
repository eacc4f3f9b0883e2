import { hashPassword } from '../../apps/api/src/accounts/passwords'
import { Person } from '../support/person'
import { ORIGIN } from './bench-config'
import type { BenchDatabase } from './database'
import { readRows, runAlone } from './fill'

const PASSWORD = 'salt wind and fescue'

/**
 * Signs every golfer of the bench in, as their browser would, and resolves to the headers that it
 * sends from then on, by account.
 */
export async function signGolfersIn(
  { superuserUrl }: BenchDatabase,
  port: number,
): Promise<Map<string, Record<string, string>>> {
  const hash = await hashPassword(PASSWORD)
  await runAlone(superuserUrl, `UPDATE accounts SET password_hash = '${hash}'`)
  const accounts = await readRows<{ id: string; email: string }>(
    superuserUrl,
    'SELECT id, email FROM accounts',
  )
  const headers = new Map<string, Record<string, string>>()
  for (const { id, email } of accounts) {
    const person = new Person(`http://127.0.0.1:${port}`)
    const from = { headers: { origin: ORIGIN } }
    await person.must('session.sign-in', { body: { email, password: PASSWORD }, ...from })
    await person.must('session.read')
    const token = person.cookie('marram-token') ?? ''
    headers.set(id, {
      cookie: `marram=${person.cookie('marram') ?? ''}; marram-token=${token}`,
      'x-marram-token': token,
      origin: ORIGIN,
    })
  }
  return headers
}
