import type { ReactNode } from 'react'

/** A number that can be opened to what it is made of. */
export function Figure(props: {
  children: ReactNode
  isOpen: boolean
  isPencil?: boolean
  label: string
  onOpen: () => void
}) {
  return (
    <button
      type="button"
      className={props.isPencil ? 'fig pencilled' : 'fig'}
      aria-expanded={props.isOpen}
      aria-label={props.label}
      onClick={props.onOpen}
    >
      {props.children}
    </button>
  )
}
