import type { ReactNode } from 'react'
import { Drawing } from './drawing'
import type { Drawing as DrawingName } from './drawings'

type NoticeKind = 'haar' | 'ok' | 'flag'

const DRAWN: Record<NoticeKind, DrawingName> = { haar: 'clock', ok: 'tick', flag: 'flag' }

/** Something the reader should know where they are: weather and connection, all clear, or trouble. */
export function Notice(props: {
  kind?: NoticeKind
  drawing?: DrawingName
  action?: ReactNode
  children: ReactNode
}) {
  const kind = props.kind ?? 'haar'
  return (
    <div
      className={kind === 'haar' ? 'notice' : `notice ${kind}`}
      role={kind === 'flag' ? 'alert' : 'status'}
    >
      <Drawing of={props.drawing ?? DRAWN[kind]} />
      <div>{props.children}</div>
      {props.action}
    </div>
  )
}
