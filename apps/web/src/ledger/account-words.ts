/** Ledger accounts as a reader says them. */
const WORDS: Record<string, string> = {
  'provider-clearing': 'Provider clearing',
  bank: 'Bank',
  'cash-drawer': 'Cash drawer',
  receivable: 'Owed at the desk',
  'deferred-clinics': 'Deferred, clinics',
  'tax-owed': 'Tax owed',
  'earned-clinics': 'Earned, clinics',
  'earned-late-cancellations': 'Earned, late cancellations',
  refunds: 'Refunds',
  'credits-owed': 'Credits owed',
  'provider-fees': 'Provider fees',
  'platform-fees': 'Platform fees',
  'refunds-due': 'Refunds due',
}

export const accountInWords = (code: string): string => WORDS[code] ?? code
