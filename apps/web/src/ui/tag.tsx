import type { ReactNode } from 'react'
import { Drawing } from './drawing'
import type { Drawing as DrawingName } from './drawings'

/** A short word with its drawing: trouble, weather, all clear. */
export function Tag(props: {
  kind: 'flag' | 'haar' | 'ok'
  drawing: DrawingName
  children: ReactNode
}) {
  return (
    <span className={`tag ${props.kind}`}>
      <Drawing of={props.drawing} />
      {props.children}
    </span>
  )
}
