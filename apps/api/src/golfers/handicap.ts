import { readAcademy } from '../academies/academies'
import { localDayOf } from '../platform/local-day'
import type { AcademyTrx } from '../platform/tenancy/transaction'

/** A handicap as it is written down: with the day on which it was said, where the academy is. */
export async function datedHandicap(
  trx: AcademyTrx,
  { handicap, now }: { handicap: number | null; now: Date },
): Promise<{ handicap: number | null; handicapOn: string | null }> {
  if (handicap === null) return { handicap, handicapOn: null }
  const { zone } = await readAcademy(trx)
  return { handicap, handicapOn: localDayOf(now, zone) }
}
