import type { ReactNode } from 'react'
import { Button } from './button'
import { Notice } from './notice'

/** Nothing there yet: what it is for, and what to do. */
export function EmptyState({ children, action }: { children: ReactNode; action?: ReactNode }) {
  return (
    <div className="empty">
      <p className="lead">{children}</p>
      {action}
    </div>
  )
}

export function ErrorState({ sentence, onRetry }: { sentence: string; onRetry?: () => void }) {
  return (
    <Notice kind="flag" action={onRetry && <Button onClick={onRetry}>Try again</Button>}>
      {sentence}
    </Notice>
  )
}

/** Ruled lines that breathe while something is on its way. */
export function SkeletonRows({ rows = 4 }: { rows?: number }) {
  return (
    <div className="skeleton" role="status" aria-label="On its way">
      {Array.from({ length: rows }, (_, index) => (
        <div key={index}>
          <span className="sk" style={{ width: `${[38, 52, 44, 60][index % 4]}%` }} />
        </div>
      ))}
    </div>
  )
}
