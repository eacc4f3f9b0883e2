import type { figure as figureSchema } from '@marram/contract'
import type { z } from 'zod'
import type { FigureFilter } from './queries'

export type Figure = z.infer<typeof figureSchema>

interface FigureRule extends Pick<FigureFilter, 'accounts' | 'kinds' | 'by' | 'isBalance'> {
  /** Whether a debit counts up (money that came in) or down. */
  sign: 1 | -1
}

const flow = { kinds: null, by: 'happened_on', isBalance: false } as const
const balance = { ...flow, isBalance: true } as const

/** What each figure of the money card is the sum of. */
export const FIGURES: Record<Figure, FigureRule> = {
  taken: {
    ...flow,
    sign: 1,
    accounts: ['provider-clearing', 'cash-drawer', 'bank'],
    kinds: ['sale-by-card', 'payment-at-desk', 'unplaced-payment'],
  },
  refunded: {
    ...flow,
    sign: -1,
    accounts: ['provider-clearing', 'cash-drawer', 'bank'],
    kinds: ['given-up', 'called-off-money', 'unplaced-refund', 'refund-failed'],
  },
  fees: { ...flow, sign: 1, accounts: ['provider-fees', 'platform-fees'] },
  earned: { ...flow, sign: -1, accounts: ['earned-clinics'] },
  'to-earn': { ...flow, sign: -1, accounts: ['deferred-clinics'], by: 'held_on' },
  'tax-owed': { ...flow, sign: -1, accounts: ['tax-owed'] },
  'late-cancellations': { ...flow, sign: -1, accounts: ['earned-late-cancellations'] },
  'owed-at-desk': { ...balance, sign: 1, accounts: ['receivable'] },
  'credits-owed': { ...balance, sign: -1, accounts: ['credits-owed'] },
}
