import { readAcademy } from '../academies/academies'
import type { ReadBooks } from '../ledger/routes'
import type { Services } from '../platform/services'
import { inAcademy } from '../platform/tenancy/transaction'
import { listTitles } from './queries'

/** What the books must be told of an academy: its currency, its zone and its clinics' titles. */
export function readBooks({ db }: Services): ReadBooks {
  return (academyId) =>
    inAcademy(db, academyId, async (trx) => {
      const { currency, zone } = await readAcademy(trx)
      return { academyId, currency, zone, titles: await listTitles(trx) }
    })
}
