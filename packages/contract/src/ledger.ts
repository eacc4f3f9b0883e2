import { z } from 'zod'
import { id, localDate, signedMinor } from './fields'

export const LEDGER_ACCOUNTS = [
  'provider-clearing',
  'bank',
  'cash-drawer',
  'receivable',
  'deferred-clinics',
  'tax-owed',
  'earned-clinics',
  'earned-late-cancellations',
  'refunds',
  'credits-owed',
  'provider-fees',
  'platform-fees',
  'refunds-due',
] as const

/** Names one figure of the money card, so that it can be opened to its transfers. */
export const figure = z.enum([
  'taken',
  'refunded',
  'fees',
  'earned',
  'to-earn',
  'tax-owed',
  'late-cancellations',
  'owed-at-desk',
  'credits-owed',
])

const month = z.object({ earnedMinor: signedMinor, toEarnMinor: signedMinor })

export const ledgerSchemas = {
  'ledger.card': {
    params: z.strictObject({ year: z.string().regex(/^2[01]\d\d$/) }),
    response: z.object({
      year: z.int(),
      currency: z.string(),
      /** 1 to 12, today's month in the academy's zone; null in another year. */
      currentMonth: z.int().nullable(),
      clinics: z.array(
        z.object({ clinicId: id, title: z.string(), months: z.array(month).length(12) }),
      ),
      lateCancellations: z.array(signedMinor).length(12),
      taxOwed: z.array(signedMinor).length(12),
      takenMinor: signedMinor,
      payments: z.int(),
      refundedMinor: signedMinor,
      refunds: z.int(),
      feesMinor: signedMinor,
      providerBalanceMinor: signedMinor,
      owedAtDeskMinor: signedMinor,
      creditsOwedMinor: signedMinor,
      toEarnMinor: signedMinor,
    }),
  },
  'ledger.transfers': {
    query: z.strictObject({
      figure,
      year: z.string().regex(/^2[01]\d\d$/),
      month: z
        .string()
        .regex(/^(1[0-2]|[1-9])$/)
        .optional(),
      clinicId: id.optional(),
    }),
    response: z.object({
      /** In the sign of the figure; adds up to it exactly. */
      totalMinor: signedMinor,
      transfers: z.array(
        z.object({
          id,
          dayLocal: localDate,
          what: z.string(),
          debit: z.array(z.enum(LEDGER_ACCOUNTS)),
          credit: z.array(z.enum(LEDGER_ACCOUNTS)),
          amountMinor: signedMinor,
        }),
      ),
    }),
  },
  'ledger.export': {
    query: z.strictObject({ year: z.string().regex(/^2[01]\d\d$/) }),
    response: z.string(),
  },
} as const
