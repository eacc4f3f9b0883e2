import type { ApiProblem } from './problem'

/** Where a form says what is wrong with the fields it sends. */
export interface ShownFields {
  /** Fields with a sentence of their own beside them; a name also stands for all beneath it. */
  beside?: readonly string[]
  /** What the others are called, for the notice that speaks of them. */
  named?: Readonly<Record<string, string>>
}

/**
 * What the notice of a form says after a refusal: all that no field says beside itself. Null where
 * every wrong field speaks for itself. No refusal passes without a sentence somewhere.
 */
export function noticeOf(
  { message, fields }: Pick<ApiProblem, 'message' | 'fields'>,
  { beside = [], named = {} }: ShownFields,
): string | null {
  if (Object.keys(fields).length === 0) return message
  const unsaid = Object.entries(fields).filter(
    ([path]) => !beside.some((shown) => path === shown || path.startsWith(`${shown}.`)),
  )
  const namesBySentence = new Map<string, string[]>()
  for (const [path, sentence] of unsaid) {
    const names = namesBySentence.get(sentence) ?? []
    const name = named[path]
    namesBySentence.set(sentence, name === undefined ? names : [...names, name])
  }
  const parts = [...namesBySentence].map(([sentence, names]) =>
    names.length > 0 ? `${names.join(', ')}: ${sentence}` : sentence,
  )
  return parts.length > 0 ? parts.join(' ') : null
}
