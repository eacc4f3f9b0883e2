import type { Answer } from '@marram/contract'
import { routeQuery } from '../api/query'

export type MoneyCard = Answer<'ledger.card'>
export type FigureName =
  | 'taken'
  | 'refunded'
  | 'fees'
  | 'earned'
  | 'to-earn'
  | 'tax-owed'
  | 'late-cancellations'
  | 'owed-at-desk'
  | 'credits-owed'

export interface OpenFigure {
  figure: FigureName
  title: string
  month?: number
  clinicId?: string
}

export const moneyQuery = (academy: string, year: number) =>
  routeQuery('ledger.card', { academy, params: { year: String(year) } })

export const figureQuery = (academy: string, year: number, open: OpenFigure) =>
  routeQuery('ledger.transfers', {
    academy,
    query: {
      figure: open.figure,
      year: String(year),
      ...(open.month === undefined ? {} : { month: String(open.month) }),
      ...(open.clinicId === undefined ? {} : { clinicId: open.clinicId }),
    },
  })
