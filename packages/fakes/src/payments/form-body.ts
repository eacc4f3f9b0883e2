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

/** A text at a path of the form, or undefined. */
export function textAt(
  form: FormValue | undefined,
  ...path: (string | number)[]
): string | undefined {
  let at: FormValue | undefined = form
  for (const part of path) {
    if (typeof at !== 'object') return undefined
    at = (at as Record<string | number, FormValue>)[part]
  }
  return typeof at === 'string' ? at : undefined
}

/** The flat texts of an object at a path: metadata. */
export function textsAt(form: FormValue | undefined, ...path: string[]): Record<string, string> {
  let at: FormValue | undefined = form
  for (const part of path)
    at = typeof at === 'object' ? (at as Record<string, FormValue>)[part] : undefined
  if (typeof at !== 'object') return {}
  return Object.fromEntries(
    Object.entries(at).filter(([, value]) => typeof value === 'string'),
  ) as Record<string, string>
}
