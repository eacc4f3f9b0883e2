import { Fragment, type ReactNode } from 'react'
import type { Session } from '../clinics/queries'

/** How a card's sessions stand beside each other. */
export interface Layout {
  halves: readonly (readonly Session[])[]
  /** What stands after each half: OUT, IN; none where there is one half only. */
  labels: readonly string[]
  hasTotal: boolean
}

/** The cells of one row, across the halves: each session's, each half's sum, the total. */
export function Across(props: {
  layout: Layout
  /** Carries the session as its key. */
  cell: (session: Session) => ReactNode
  sum: (part: readonly Session[], label: string) => ReactNode
  total: ReactNode
}) {
  const { layout, cell, sum, total } = props
  return (
    <>
      {layout.halves.map((part, index) => {
        const label = layout.labels[index]
        return (
          <Fragment key={index}>
            {part.map(cell)}
            {label && sum(part, label)}
          </Fragment>
        )
      })}
      {layout.hasTotal && total}
    </>
  )
}
