import { useId, type InputHTMLAttributes, type ReactNode, type TextareaHTMLAttributes } from 'react'
import { Drawing } from './drawing'

interface FieldProps {
  label: string
  hint?: ReactNode
  /** The sentence that says what is wrong. */
  error?: string | undefined
}

/** A labelled line of text with its hint and its error tied to it. */
export function Field({
  label,
  hint,
  error,
  ...input
}: FieldProps & InputHTMLAttributes<HTMLInputElement>) {
  const { id, describedBy } = useFieldIds({ hint, error })
  return (
    <div className={error ? 'f bad' : 'f'}>
      <label htmlFor={id}>{label}</label>
      <input
        {...input}
        id={id}
        aria-describedby={describedBy}
        aria-invalid={error ? true : undefined}
      />
      <Beneath id={id} hint={hint} error={error} />
    </div>
  )
}

export function TextArea({
  label,
  hint,
  error,
  ...input
}: FieldProps & TextareaHTMLAttributes<HTMLTextAreaElement>) {
  const { id, describedBy } = useFieldIds({ hint, error })
  return (
    <div className={error ? 'f bad' : 'f'}>
      <label htmlFor={id}>{label}</label>
      <textarea
        rows={4}
        {...input}
        id={id}
        aria-describedby={describedBy}
        aria-invalid={error ? true : undefined}
      />
      <Beneath id={id} hint={hint} error={error} />
    </div>
  )
}

interface SelectProps<Value extends string> extends FieldProps {
  value: Value
  options: readonly { value: Value; label: string }[]
  onChange: (value: Value) => void
}

export function SelectField<Value extends string>({
  label,
  hint,
  error,
  value,
  options,
  onChange,
}: SelectProps<Value>) {
  const { id, describedBy } = useFieldIds({ hint, error })
  return (
    <div className={error ? 'f bad' : 'f'}>
      <label htmlFor={id}>{label}</label>
      <select
        id={id}
        value={value}
        aria-describedby={describedBy}
        aria-invalid={error ? true : undefined}
        // A select holds the value of one of its options, and of nothing else.
        onChange={(event) => onChange(event.target.value as Value)}
      >
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
      <Beneath id={id} hint={hint} error={error} />
    </div>
  )
}

export function CheckField(props: {
  label: ReactNode
  isChecked: boolean
  onChange: (isChecked: boolean) => void
  error?: string | undefined
}) {
  const { id, describedBy } = useFieldIds({ error: props.error })
  return (
    <div className="f">
      <label className="tickrow" htmlFor={id}>
        <input
          id={id}
          type="checkbox"
          checked={props.isChecked}
          aria-describedby={describedBy}
          aria-invalid={props.error ? true : undefined}
          onChange={(event) => props.onChange(event.target.checked)}
        />
        <span>{props.label}</span>
      </label>
      <Beneath id={id} error={props.error} />
    </div>
  )
}

function useFieldIds({ hint, error }: { hint?: ReactNode; error?: string | undefined }) {
  const id = useId()
  const parts = [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean)
  return { id, describedBy: parts.length > 0 ? parts.join(' ') : undefined }
}

function Beneath({
  id,
  hint,
  error,
}: {
  id: string
  hint?: ReactNode
  error?: string | undefined
}) {
  return (
    <>
      {hint && (
        <p className="hint" id={`${id}-hint`}>
          {hint}
        </p>
      )}
      {error && (
        <p className="err" id={`${id}-error`}>
          <Drawing of="flag" />
          {error}
        </p>
      )}
    </>
  )
}

/** Moves the focus to the first field that is wrong, once the errors are on the page. */
export function focusFirstWrong(form: HTMLElement | null): void {
  requestAnimationFrame(() => {
    form?.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus()
  })
}
