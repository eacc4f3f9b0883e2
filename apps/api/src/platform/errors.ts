import { PROBLEM_STATUS, type ProblemCode, type ProblemDocument } from '@marram/contract'

/** An expected refusal on its way to the edge, where it becomes a problem document. */
export class Problem extends Error {
  readonly code: ProblemCode
  readonly fields: Record<string, string> | undefined

  constructor(code: ProblemCode, detail: string, fields?: Record<string, string>) {
    super(detail)
    this.code = code
    this.fields = fields
  }
}

const TITLES: Partial<Record<ProblemCode, string>> = {
  'invalid-fields': 'Some fields need another look',
  'not-found': 'Not found',
  'not-allowed': 'Not allowed',
  unexpected: 'Something went wrong on our side',
}

/** The document that a problem travels in. Database text never comes this far. */
export function toProblemDocument(problem: Problem, requestId?: string): ProblemDocument {
  return {
    type: 'about:blank',
    title: TITLES[problem.code] ?? problem.message,
    status: PROBLEM_STATUS[problem.code],
    code: problem.code,
    detail: problem.message,
    ...(requestId ? { requestId } : {}),
    ...(problem.fields ? { fields: problem.fields } : {}),
  }
}

export const notFound = (what: string) => new Problem('not-found', `There is no such ${what}.`)
