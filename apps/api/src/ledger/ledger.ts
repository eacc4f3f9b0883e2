import { newId } from '../platform/ids'
import { invariant } from '../platform/invariant'
import type { Services } from '../platform/services'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import type { Posting } from './postings'
import { findTransferEntries, insertTransfer } from './queries'

/**
 * Posts to the ledger, once: the same thing posted again changes nothing. A posting of nothing (a
 * free place) is left out. Resolves to whether it was written now.
 */
export async function post(
  { clock }: Pick<Services, 'clock'>,
  trx: AcademyTrx,
  { posting, currency }: { posting: Posting; currency: string },
): Promise<boolean> {
  if (posting.entries.length === 0) return false
  const sum = posting.entries.reduce((total, { amountMinor }) => total + amountMinor, 0)
  invariant(sum === 0, `the posting ${posting.kind} balances`)
  const postedAt = clock.now()
  return insertTransfer(trx, { id: newId(postedAt), posting, currency, postedAt })
}

export { findTransferEntries }
export type { EntryDraft, PlaceAmount, Posting, SessionRef } from './postings'
