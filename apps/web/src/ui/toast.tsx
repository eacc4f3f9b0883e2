import { useEffect, useSyncExternalStore } from 'react'

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

/** Where toasts are laid down; read out as they come. */
export function ToastRegion() {
  const shown = useSyncExternalStore(subscribe, () => toasts)
  return (
    <div className="toasts" role="status" aria-live="polite">
      {shown.map((entry) => (
        <ToastLine key={entry.id} entry={entry} />
      ))}
    </div>
  )
}

function ToastLine({ entry }: { entry: Toast }) {
  useEffect(() => {
    const timer = setTimeout(() => dismiss(entry.id), SHOWN_MS)
    return () => clearTimeout(timer)
  }, [entry.id])
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
          }}
        >
          Undo
        </button>
      )}
    </div>
  )
}
