import type { KeyboardEvent } from 'react'

/** Arrow keys move between a table's marks, Home and End to the row's ends. */
export function moveFocus(event: KeyboardEvent<HTMLTableElement>): void {
  const cell = event.target instanceof Element ? event.target.closest('td.mk') : null
  const row = cell?.closest('tr')
  if (!cell || !row) return
  const marksOf = (one: HTMLTableRowElement | undefined) => [
    ...(one?.querySelectorAll<HTMLElement>('td.mk') ?? []),
  ]
  const inRow = marksOf(row)
  const at = inRow.findIndex((mark) => mark === cell)
  const beside = (step: number) => marksOf(event.currentTarget.rows[row.rowIndex + step])[at]
  const next: Record<string, HTMLElement | undefined> = {
    ArrowLeft: inRow[at - 1],
    ArrowRight: inRow[at + 1],
    ArrowUp: beside(-1),
    ArrowDown: beside(1),
    Home: inRow[0],
    End: inRow.at(-1),
  }
  const target = next[event.key]
  if (!target) return
  event.preventDefault()
  target.focus()
}
