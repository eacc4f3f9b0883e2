import type { ReactNode } from 'react'

/** Filters and recurrence, read aloud and changed in place. */
export function Sentence({ children, isSmall }: { children: ReactNode; isSmall?: boolean }) {
  return <p className={isSmall ? 'say sm' : 'say'}>{children}</p>
}

interface WordProps<Value extends string> {
  /** What the word is about, for those who hear it: "Day". */
  label: string
  value: Value
  onChange: (value: Value) => void
  isWrong?: boolean
}

export function SelectWord<Value extends string>({
  label,
  value,
  onChange,
  options,
  isWrong,
}: WordProps<Value> & { options: readonly { value: Value; label: string }[] }) {
  return (
    <select
      aria-label={label}
      aria-invalid={isWrong || undefined}
      value={value}
      // A select holds the value of one of its options, and of nothing else.
      onChange={(event) => onChange(event.target.value as Value)}
    >
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
  isWrong,
  type = 'text',
  ...rest
}: WordProps<string> & {
  type?: 'text' | 'date' | 'time' | 'number'
  min?: number
  max?: number
  step?: number
  size?: number
  placeholder?: string
  inputMode?: 'decimal'
}) {
  return (
    <input
      {...rest}
      type={type}
      aria-label={label}
      aria-invalid={isWrong || undefined}
      value={value}
      onChange={(event) => onChange(event.target.value)}
    />
  )
}
