import type { ReactNode } from 'react'

/** Filters and recurrence, read aloud and changed in place. */
export function Sentence({ children, isSmall }: { children: ReactNode; isSmall?: boolean }) {
  return <p className={isSmall ? 'say sm' : 'say'}>{children}</p>
}

interface WordProps {
  /** What the word is about, for those who hear it: "Day". */
  label: string
  value: string
  onChange: (value: string) => void
}

export function SelectWord({
  label,
  value,
  onChange,
  options,
}: WordProps & { options: readonly { value: string; label: string }[] }) {
  return (
    <select aria-label={label} value={value} onChange={(event) => onChange(event.target.value)}>
      {options.map((option) => (
        <option key={option.value} value={option.value}>
          {option.label}
        </option>
      ))}
    </select>
  )
}

export function InputWord({
  label,
  value,
  onChange,
  type = 'text',
  ...rest
}: WordProps & {
  type?: 'text' | 'date' | 'time' | 'number'
  min?: number
  max?: number
  step?: number
  size?: number
  placeholder?: string
  inputMode?: 'decimal'
  isWrong?: boolean
}) {
  const { isWrong, ...input } = rest
  return (
    <input
      {...input}
      type={type}
      aria-label={label}
      aria-invalid={isWrong || undefined}
      value={value}
      onChange={(event) => onChange(event.target.value)}
    />
  )
}
