import type { Knex } from 'knex'
import type { AcademyTrx } from '../platform/tenancy/transaction'

export interface MailKey {
  /** What makes this mail this one: "enrolment.confirmed:{id}". Sent once. */
  businessKey: string
  recipient: string
  template: string
  createdAt: Date
}

/** Resolves to whether the mail is still to be sent. */
export async function claimMail(trx: AcademyTrx, key: MailKey): Promise<boolean> {
  const academyId = trx.raw("current_setting('app.academy_id')::uuid")
  await trx('mails')
    .insert({ academyId, ...key })
    .onConflict(['academy_id', 'business_key'])
    .ignore()
  const row = await trx('mails')
    .where({ businessKey: key.businessKey })
    .first<{ sentAt: Date | null } | undefined>('sentAt')
  return row?.sentAt === null
}

export async function noteSent(
  trx: AcademyTrx,
  sent: { businessKey: string; providerMessageId: string; sentAt: Date },
): Promise<void> {
  const { businessKey, ...rest } = sent
  await trx('mails').where({ businessKey }).update(rest)
}

export async function noteAccountMail(
  db: Knex,
  key: MailKey & { accountId: string; providerMessageId: string; sentAt: Date },
): Promise<void> {
  await db('accountMails').insert(key).onConflict('business_key').ignore()
}

export async function isSilenced(db: Knex, email: string): Promise<boolean> {
  const row = await db('silencedAddresses').where({ email }).first<{ email: string } | undefined>()
  return row !== undefined
}

export async function silence(
  db: Knex,
  row: { email: string; reason: string; silencedAt: Date },
): Promise<void> {
  await db('silencedAddresses').insert(row).onConflict('email').ignore()
}

export async function insertMailEvents(
  trx: Knex.Transaction,
  rows: readonly { eventId: string; type: string; receivedAt: Date }[],
): Promise<string[]> {
  if (rows.length === 0) return []
  const written = await trx('providerEvents')
    .insert(rows.map((row) => ({ provider: 'mail', ...row })))
    .onConflict(['provider', 'event_id'])
    .ignore()
    .returning<{ eventId: string }[]>('event_id')
  return written.map(({ eventId }) => eventId)
}

export interface Addressee {
  accountId: string
  email: string
  name: string
}

/** Who gets the mail about a golfer: themselves, or their guardian; nobody for one without account. */
export async function findAddressee(
  trx: AcademyTrx,
  golferId: string,
): Promise<Addressee | undefined> {
  return trx('golfers')
    .join('accounts', (join) =>
      join.on('accounts.id', trx.raw('coalesce(golfers.account_id, golfers.guardian_account_id)')),
    )
    .where('golfers.id', golferId)
    .first('accounts.id as accountId', 'accounts.email', 'accounts.name')
}

/** Who has, or had until it was called off, a place in a session; and what may still be chosen. */
export async function listEnrolmentsOfSession(
  trx: AcademyTrx,
  sessionId: string,
): Promise<{ enrolmentId: string; owedMinor: number }[]> {
  const { rows } = await trx.raw<{ rows: { enrolmentId: string; owedMinor: number }[] }>(
    `SELECT p.enrolment_id, coalesce(o.amount_minor, 0) AS owed_minor FROM places p
     LEFT JOIN owed_places o ON o.academy_id = p.academy_id AND o.place_id = p.id
       AND o.choice IS NULL
     WHERE p.session_id = ? AND (p.state = 'confirmed' OR p.ended_because = 'called-off')
     ORDER BY p.id`,
    [sessionId],
  )
  return rows
}
