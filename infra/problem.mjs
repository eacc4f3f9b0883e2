/** An expected failure whose message is one sentence that says what to do; printed without a stack. */
export class Problem extends Error {}

/** Turns a low-level failure into a Problem when its cause is one that people can mend. */
export function explain(error, { doing }) {
  if (error instanceof Problem) return error
  const text = `${error?.message ?? error} ${error?.stderr ?? ''}`
  if (/ENOSPC|No space left on device/i.test(text)) {
    return new Problem(`The disk is full, which stopped ${doing}. Free some space and start again.`)
  }
  if (/EACCES|EPERM|Permission denied/i.test(text)) {
    return new Problem(
      `This account may not write where it must, which stopped ${doing}. ` +
        'Run it as the owner of the checkout, or as root.',
    )
  }
  return error instanceof Error ? error : new Error(text)
}
