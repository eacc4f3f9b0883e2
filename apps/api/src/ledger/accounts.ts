import type { LEDGER_ACCOUNTS } from '@marram/contract'

/** A ledger account of an academy. What each is for is said in this folder's README. */
export type LedgerAccount = (typeof LEDGER_ACCOUNTS)[number]
