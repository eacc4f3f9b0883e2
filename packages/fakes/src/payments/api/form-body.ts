import { ProviderError } from '../provider-error'

export type FormValue = string | FormValue[] | { [key: string]: FormValue }

/**
 * Reads a form-encoded body with nested brackets, as the provider's SDK writes it:
 * `line_items[0][quantity]=1` becomes `{ line_items: [{ quantity: '1' }] }`.
 */
export function readFormBody(text: string): Record<string, FormValue> {
  const root: Record<string, FormValue> = {}
  for (const [name, value] of new URLSearchParams(text)) {
    const path = [...name.matchAll(/[^[\]]+/g)].map(([part]) => part)
    let at: Record<string, FormValue> = root
    for (const part of path.slice(0, -1)) {
      const next = at[part]
      const child = typeof next === 'object' ? next : {}
      at[part] = child
      // Lists are kept as objects with numbered keys until everything has been read.
      at = child as Record<string, FormValue>
    }
    at[path.at(-1) ?? name] = value
  }
  return toLists(root) as Record<string, FormValue>
}

function toLists(value: FormValue): FormValue {
  if (typeof value !== 'object') return value
  const entries = Object.entries(value).map(([key, inner]) => [key, toLists(inner)] as const)
  const isList = entries.length > 0 && entries.every(([key], index) => key === String(index))
  return isList ? entries.map(([, inner]) => inner) : Object.fromEntries(entries)
}

function valueAt(form: FormValue | undefined, path: readonly (string | number)[]) {
  let at: FormValue | undefined = form
  for (const part of path) {
    if (typeof at !== 'object') return undefined
    at = (at as Record<string | number, FormValue>)[part]
  }
  return at
}

/** A text at a path of the form, or undefined. */
export function textAt(
  form: FormValue | undefined,
  ...path: (string | number)[]
): string | undefined {
  const value = valueAt(form, path)
  return typeof value === 'string' ? value : undefined
}

/** A text that must be there. @throws ProviderError where it is not. */
export function requiredAt(form: FormValue | undefined, ...path: (string | number)[]): string {
  const text = textAt(form, ...path)
  if (text) return text
  const param = pathName(path)
  throw new ProviderError(400, `Missing required param: ${param}.`, {
    code: 'parameter_missing',
    param,
  })
}

/** A whole number at a path, or undefined. @throws ProviderError for what is no whole number. */
export function integerAt(
  form: FormValue | undefined,
  ...path: (string | number)[]
): number | undefined {
  const text = textAt(form, ...path)
  if (text === undefined) return undefined
  const number = Number(text)
  if (/^-?\d+$/.test(text) && Number.isSafeInteger(number)) return number
  throw new ProviderError(400, `Invalid integer: ${text}`, {
    code: 'parameter_invalid_integer',
    param: pathName(path),
  })
}

/** The flat texts of an object at a path: metadata, evidence. */
export function textsAt(form: FormValue | undefined, ...path: string[]): Record<string, string> {
  const value = valueAt(form, path)
  if (typeof value !== 'object') return {}
  return Object.fromEntries(
    Object.entries(value).filter(
      (entry): entry is [string, string] => typeof entry[1] === 'string',
    ),
  )
}

/** The items of a list at a name; none where there is no list. */
export function itemsAt(form: Record<string, FormValue>, name: string): FormValue[] {
  const value = form[name]
  return Array.isArray(value) ? value : []
}

const pathName = ([first = '', ...rest]: readonly (string | number)[]): string =>
  [first, ...rest.map((part) => `[${part}]`)].join('')
