import type { Handlers, RequestContext } from '../platform/http/context'
import { asAcademy } from '../platform/http/narrow'
import type { Services } from '../platform/services'
import { exportYear, readFigure, readMoneyCard, type BooksOf } from './reports'

/** The ledger knows no clinic and no academy: whoever composes the app tells it of them. */
export type ReadBooks = (academyId: string) => Promise<BooksOf>

export function ledgerHandlers(services: Services, readBooks: ReadBooks): Handlers {
  const academyIdOf = (context: RequestContext) => asAcademy(context).academyId
  return {
    'ledger.card': async ({ params }, context) =>
      readMoneyCard(services, {
        books: await readBooks(academyIdOf(context)),
        year: Number(params.year),
      }),
    'ledger.transfers': ({ query }, context) =>
      readFigure(services, {
        academyId: academyIdOf(context),
        figure: query.figure,
        year: Number(query.year),
        ...(query.month ? { month: Number(query.month) } : {}),
        ...(query.clinicId ? { clinicId: query.clinicId } : {}),
      }),
    'ledger.export': ({ query }, context) =>
      exportYear(services, { academyId: academyIdOf(context), year: Number(query.year) }),
  }
}
