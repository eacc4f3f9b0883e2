import type { ReactNode } from 'react'
import { ThemeSwitch } from '../ui/theme-switch'

export function PublicFoot({ children }: { children: ReactNode }) {
  return (
    <footer className="foot">
      <div className="wrap public">
        <span>{children}</span>
        <span>
          <ThemeSwitch />
        </span>
      </div>
    </footer>
  )
}
