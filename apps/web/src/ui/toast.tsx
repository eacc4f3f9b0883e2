import { useEffect, useRef, useState, useSyncExternalStore, type RefObject } from 'react'

interface Toast {
  id: number
  text: string
  undo?: () => void
}

const SHOWN_MS = 8_000
let toasts: readonly Toast[] = []
let last = 0
const listeners = new Set<() => void>()

function change(next: readonly Toast[]): void {
  toasts = next
  for (const listener of listeners) listener()
}

/** Says that something was done, with a way back where there is one. */
export function toast(text: string, undo?: () => void): void {
  last += 1
  change([...toasts.slice(-2), { id: last, text, ...(undo ? { undo } : {}) }])
}

const dismiss = (id: number) => change(toasts.filter((entry) => entry.id !== id))

function subscribe(listener: () => void): () => void {
  listeners.add(listener)
  return () => listeners.delete(listener)
}

/** Where toasts are laid down; read out as they come. F6 leads to them, and back. */
export function ToastRegion() {
  const shown = useSyncExternalStore(subscribe, () => toasts)
  const region = useRef<HTMLDivElement>(null)
  const [isHovered, setIsHovered] = useState(false)
  const [isFocused, setIsFocused] = useState(false)
  useF6(region)
  return (
    <div
      ref={region}
      className="toasts"
      role="status"
      aria-live="polite"
      tabIndex={-1}
      onMouseEnter={() => setIsHovered(true)}
      onMouseLeave={() => setIsHovered(false)}
      onFocus={() => setIsFocused(true)}
      onBlur={() => setIsFocused(false)}
    >
      {shown.map((entry) => (
        <ToastLine
          key={entry.id}
          entry={entry}
          isHeld={isHovered || isFocused}
          // A button that goes away with the focus on it says nothing of it.
          onUndone={() => setIsFocused(false)}
        />
      ))}
    </div>
  )
}

/** Nothing is taken away under the pointer or the focus: the time begins anew when they leave. */
function ToastLine(props: { entry: Toast; isHeld: boolean; onUndone: () => void }) {
  const { entry, isHeld, onUndone } = props
  useEffect(() => {
    if (isHeld) return
    const timer = setTimeout(() => dismiss(entry.id), SHOWN_MS)
    return () => clearTimeout(timer)
  }, [entry.id, isHeld])
  const { undo } = entry
  return (
    <div className="toast">
      <span>{entry.text}</span>
      {undo && (
        <button
          type="button"
          className="btn"
          onClick={() => {
            undo()
            dismiss(entry.id)
            onUndone()
          }}
        >
          Undo
        </button>
      )}
    </div>
  )
}

function useF6(region: RefObject<HTMLElement | null>): void {
  const origin = useRef<Element | null>(null)
  useEffect(() => {
    const press = (event: KeyboardEvent) => {
      if (event.key !== 'F6' || !region.current || toasts.length === 0) return
      event.preventDefault()
      if (region.current.contains(document.activeElement)) {
        if (origin.current instanceof HTMLElement) origin.current.focus()
        return
      }
      origin.current = document.activeElement
      const target = region.current.querySelector('button') ?? region.current
      target.focus()
    }
    document.addEventListener('keydown', press)
    return () => document.removeEventListener('keydown', press)
  }, [region])
}
