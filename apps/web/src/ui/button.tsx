import type { ButtonHTMLAttributes, ReactNode } from 'react'

export type ButtonKind = 'plain' | 'go' | 'quiet' | 'danger'

export interface ButtonLook {
  kind?: ButtonKind
  isBig?: boolean
  isWide?: boolean
}

/** The classes of a button, for links that look like one. */
export function buttonClass({ kind = 'plain', isBig, isWide }: ButtonLook = {}): string {
  return ['btn', kind === 'plain' ? '' : kind, isBig ? 'big' : '', isWide ? 'wide' : '']
    .filter(Boolean)
    .join(' ')
}

interface ButtonProps extends ButtonLook, ButtonHTMLAttributes<HTMLButtonElement> {
  /** While it works: what it says meanwhile. The button keeps its place and takes no second press. */
  waiting?: string | false
  /** Why it cannot be pressed; shown under it. */
  reason?: string | undefined
  children: ReactNode
}

export function Button({ kind, isBig, isWide, waiting, reason, children, ...rest }: ButtonProps) {
  const isWaiting = typeof waiting === 'string'
  return (
    <>
      <button
        type="button"
        {...rest}
        className={buttonClass({
          ...(kind ? { kind } : {}),
          isBig: isBig ?? false,
          isWide: isWide ?? false,
        })}
        disabled={rest.disabled ?? reason !== undefined}
        aria-disabled={isWaiting || undefined}
        onClick={isWaiting ? (event) => event.preventDefault() : rest.onClick}
      >
        {isWaiting ? waiting : children}
      </button>
      {reason !== undefined && <p className="hint">{reason}</p>}
    </>
  )
}
