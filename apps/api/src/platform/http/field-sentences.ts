import type { ZodError } from 'zod'

/** A sentence for each wrong field, by its path. The first thing wrong with a field is said. */
export function fieldSentences(error: ZodError): Record<string, string> {
  const sentences: Record<string, string> = {}
  for (const issue of error.issues) {
    if (issue.code === 'unrecognized_keys') {
      for (const key of issue.keys) {
        sentences[[...issue.path, key].join('.')] ??= 'This field is not known here.'
      }
      continue
    }
    sentences[issue.path.join('.') || 'body'] ??= sentenceOf(issue)
  }
  return sentences
}

function sentenceOf(issue: ZodError['issues'][number]): string {
  // Our own schemas carry sentences with a full stop; the library's default texts do not.
  if (/[.?]$/.test(issue.message)) return issue.message
  switch (issue.code) {
    case 'too_small':
      return `This is too small or too short: at least ${String(issue.minimum)}.`
    case 'too_big':
      return `This is too large or too long: at most ${String(issue.maximum)}.`
    case 'invalid_type':
      return issue.input === undefined
        ? 'Please fill this in.'
        : `This should be ${issue.expected}.`
    case 'invalid_value':
      return `This should be one of: ${issue.values.map(String).join(', ')}.`
    default:
      return 'This is not in the form we expect.'
  }
}
