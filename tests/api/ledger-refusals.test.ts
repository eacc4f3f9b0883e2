import type { Knex } from 'knex'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { connect } from '../../apps/api/src/platform/db/connect'
import { newId } from '../../apps/api/src/platform/ids'
import { inAcademy } from '../../apps/api/src/platform/tenancy/transaction'
import { takeDatabase, type TestDatabase } from '../support/database'
import { OURS, THEIRS, inOurs, makeTwins } from '../tenancy/twins'

/** What the database itself refuses, whatever the code above it says. Connected as the app. */
let database: TestDatabase
let app: Knex
let before: unknown

const AT = new Date('2031-04-01T18:00:00Z')
const DAY = '2031-04-01'

beforeAll(async () => {
  database = await takeDatabase()
  const superuser = connect({ url: database.superuserUrl, poolSize: 1, name: 'tests' })
  await makeTwins(superuser)
  await superuser.destroy()
  app = connect({ url: database.url, poolSize: 2, name: 'tests' })
  for (const academyId of [OURS, THEIRS]) {
    await inAcademy(app, academyId, (trx) =>
      trx('ledgerAccounts').insert([
        { academyId, code: 'bank' },
        { academyId, code: 'earned-clinics' },
      ]),
    )
  }
})
afterAll(async () => {
  await app.destroy()
  await database.drop()
})

const everything = () =>
  inOurs(app, async (trx) => ({
    transfers: await trx('transfers').orderBy('id'),
    entries: await trx('entries').orderBy(['transferId', 'position']),
  }))

interface Line {
  amountMinor: number
  currency?: string
  code?: string
  happenedOn?: string
  academyId?: string
}

const transferRow = (id: string, change: object = {}) => ({
  academyId: OURS,
  id,
  kind: 'sale',
  sourceType: 'order',
  sourceId: newId(AT),
  what: 'A sale',
  happenedOn: DAY,
  postedAt: AT,
  ...change,
})

const entryRows = (transferId: string, lines: readonly Line[], from = 0) =>
  lines.map((line, index) => ({
    academyId: line.academyId ?? OURS,
    transferId,
    position: from + index,
    accountCode: line.code ?? 'bank',
    currency: line.currency ?? 'EUR',
    amountMinor: line.amountMinor,
    happenedOn: line.happenedOn ?? DAY,
  }))

/** Posts a transfer of these lines in one transaction of our academy. */
const post = (lines: readonly Line[], id = newId(AT)): Promise<string> =>
  inOurs(app, async (trx) => {
    await trx('transfers').insert(transferRow(id))
    if (lines.length > 0) await trx('entries').insert(entryRows(id, lines))
    return id
  })

const run = (sql: string): Promise<void> =>
  inOurs(app, async (trx) => {
    await trx.raw(sql)
  })

const GOOD = [{ amountMinor: 100 }, { amountMinor: -100, code: 'earned-clinics' }]
const refusedBy = (constraint: string) => ({ code: '23514', constraint })
const DENIED = { code: '42501' }

beforeEach(async () => {
  await post(GOOD)
  before = await everything()
})

const expectUnchanged = async () => expect(await everything()).toEqual(before)

describe('a transfer', () => {
  it('that is whole is kept', async () => {
    await post(GOOD)
    await expect(expectUnchanged()).rejects.toThrow()
  })

  it.each<[string, Line[], string]>([
    ['is empty', [], 'transfer_has_two_entries'],
    ['has a single entry', [{ amountMinor: 100 }], 'transfer_has_two_entries'],
    ['does not balance', [{ amountMinor: 100 }, { amountMinor: -99 }], 'transfer_balances'],
    [
      'balances across currencies only',
      [{ amountMinor: 100 }, { amountMinor: -100, currency: 'USD' }],
      'transfer_balances',
    ],
    [
      'balances in one currency and not in the other',
      [...GOOD, { amountMinor: 5, currency: 'USD' }],
      'transfer_balances',
    ],
    [
      'has an entry of another day',
      [{ amountMinor: 100 }, { amountMinor: -100, happenedOn: '2031-03-31' }],
      'transfer_is_of_one_day',
    ],
    ['has an entry of nothing', [...GOOD, { amountMinor: 0 }], 'entries_amount_minor_check'],
  ])('that %s is refused', async (_, lines, constraint) => {
    await expect(post(lines)).rejects.toMatchObject(refusedBy(constraint))
    await expectUnchanged()
  })

  it('that comes from the same source again is refused', async () => {
    const again = inOurs(app, async (trx) => {
      const { kind, sourceType, sourceId } =
        await trx('transfers').first<ReturnType<typeof transferRow>>()
      const id = newId(AT)
      await trx('transfers').insert(transferRow(id, { kind, sourceType, sourceId }))
      await trx('entries').insert(entryRows(id, GOOD))
    })
    await expect(again).rejects.toMatchObject({ code: '23505' })
    await expectUnchanged()
  })
})

describe('what is written', () => {
  it.each([
    ['an amount', 'UPDATE entries SET amount_minor = amount_minor * 2'],
    ['an account', `UPDATE entries SET account_code = 'bank'`],
    ['a day', `UPDATE transfers SET happened_on = '2031-05-01'`],
    ['a text', `UPDATE transfers SET what = 'Another'`],
    ['an entry, by deleting it', 'DELETE FROM entries'],
    ['a transfer, by deleting it', 'DELETE FROM transfers'],
    ['everything, by emptying the table', 'TRUNCATE entries, transfers'],
    [
      'an entry, by writing over it',
      `INSERT INTO entries SELECT * FROM entries
       ON CONFLICT (academy_id, transfer_id, position) DO UPDATE SET amount_minor = 1`,
    ],
  ])('is never edited: %s', async (_, sql) => {
    await expect(run(sql)).rejects.toMatchObject(DENIED)
    await expectUnchanged()
  })

  it('is never extended later, not even by entries that balance', async () => {
    const id = await post(GOOD)
    before = await everything()
    const later = inOurs(app, async (trx) => trx('entries').insert(entryRows(id, GOOD, 2)))
    await expect(later).rejects.toMatchObject(refusedBy('transfer_written_at_once'))
    await expectUnchanged()
  })

  it('cannot say itself in which transaction it was written', async () => {
    const forged = inOurs(app, async (trx) => {
      await trx('transfers').insert(transferRow(newId(AT), { writtenIn: '1' }))
    })
    await expect(forged).rejects.toMatchObject(DENIED)
  })
})

describe('a transfer of two academies', () => {
  it('is refused by the policy while inside one of them', async () => {
    const mixed = post([{ amountMinor: 100 }, { amountMinor: -100, academyId: THEIRS }])
    await expect(mixed).rejects.toMatchObject(DENIED)
    await expectUnchanged()
  })

  it('is refused by its key when the setting is changed between the entries', async () => {
    const mixed = inOurs(app, async (trx) => {
      const id = newId(AT)
      await trx('transfers').insert(transferRow(id))
      await trx('entries').insert(entryRows(id, [{ amountMinor: 100 }]))
      await enter(trx, THEIRS)
      const theirs = [{ amountMinor: -100, academyId: THEIRS }]
      await trx('entries').insert(entryRows(id, theirs, 1))
    })
    await expect(mixed).rejects.toMatchObject({ code: '23503' })
    await expectUnchanged()
  })
})

describe('the check at commit', () => {
  const LOPSIDED = [{ amountMinor: 100 }, { amountMinor: -1 }]

  it.each([
    ['another academy', THEIRS],
    ['no academy', ''],
  ])('sees the entries when the setting says %s by then', async (_, setting) => {
    const hidden = inOurs(app, async (trx) => {
      const id = newId(AT)
      await trx('transfers').insert(transferRow(id))
      await trx('entries').insert(entryRows(id, LOPSIDED))
      await enter(trx, setting)
    })
    await expect(hidden).rejects.toMatchObject(refusedBy('transfer_balances'))
    await expectUnchanged()
  })

  it('is made again for entries that come after it was made early', async () => {
    const early = inOurs(app, async (trx) => {
      const id = newId(AT)
      await trx('transfers').insert(transferRow(id))
      await trx('entries').insert(entryRows(id, GOOD))
      await trx.raw('SET CONSTRAINTS ALL IMMEDIATE')
      await trx('entries').insert(entryRows(id, [{ amountMinor: 7 }], 2))
    })
    await expect(early).rejects.toMatchObject(refusedBy('transfer_balances'))
    await expectUnchanged()
  })

  it.each([
    ['switched off for the session', 'SET LOCAL session_replication_role = replica'],
    ['switched off at the table', 'ALTER TABLE entries DISABLE TRIGGER entries_are_whole'],
    [
      'replaced',
      'CREATE OR REPLACE FUNCTION check_transfer() RETURNS trigger AS $$$$ LANGUAGE sql',
    ],
    ['dropped', 'DROP TRIGGER entries_are_whole ON entries'],
  ])('cannot be %s by the app', async (_, sql) => {
    await expect(run(sql)).rejects.toMatchObject(DENIED)
  })
})

/** Changes the setting in the middle of a transaction, as only a broken or hostile query would. */
const enter = (trx: Knex.Transaction, academyId: string) =>
  trx.raw(`SELECT set_config('app.academy_id', ?, true)`, [academyId])
