import type { MoneyCard } from './queries'

/** What a month earned (ink), and what is paid for it but not yet earned (pencil). */
export type MonthMoney = MoneyCard['clinics'][number]['months'][number]

const MONTHS_OF_A_YEAR = 12

/** Ink is added to ink and pencil to pencil: a total of both would be the sum of neither. */
export function totalOf(amounts: readonly MonthMoney[]): MonthMoney {
  return amounts.reduce(
    (sum, { earnedMinor, toEarnMinor }) => ({
      earnedMinor: sum.earnedMinor + earnedMinor,
      toEarnMinor: sum.toEarnMinor + toEarnMinor,
    }),
    { earnedMinor: 0, toEarnMinor: 0 },
  )
}

/** Amounts that are never in pencil: late cancellations, tax owed. */
export const inInk = (amountsMinor: readonly number[]): MonthMoney[] =>
  amountsMinor.map((earnedMinor) => ({ earnedMinor, toEarnMinor: 0 }))

/** All of each month, net of tax: its clinics and its late cancellations. */
export function allByMonth({
  clinics,
  lateCancellations,
}: Pick<MoneyCard, 'clinics' | 'lateCancellations'>): MonthMoney[] {
  const rows = [...clinics.map(({ months }) => months), inInk(lateCancellations)]
  return Array.from({ length: MONTHS_OF_A_YEAR }, (_, month) =>
    totalOf(rows.flatMap((row) => row.slice(month, month + 1))),
  )
}
