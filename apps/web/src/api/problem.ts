import type { ProblemCode, ProblemDocument } from '@marram/contract/routes'

/** A refusal of the API, or of the network, in words that can be shown. */
export class ApiProblem extends Error {
  readonly code: ProblemCode | 'no-connection'
  readonly status: number
  readonly fields: Readonly<Record<string, string>>

  constructor(problem: {
    code: ProblemCode | 'no-connection'
    status: number
    detail: string
    fields?: Record<string, string> | undefined
  }) {
    super(problem.detail)
    this.code = problem.code
    this.status = problem.status
    this.fields = problem.fields ?? {}
  }
}

export const noConnection = () =>
  new ApiProblem({
    code: 'no-connection',
    status: 0,
    detail: 'No connection. Please try again when there is signal.',
  })

export function fromDocument(document: ProblemDocument): ApiProblem {
  return new ApiProblem(document)
}

/** Anything that was thrown, as a refusal with a sentence. What is no refusal is a fault, and told. */
export function problemOf(error: unknown): ApiProblem {
  if (error instanceof ApiProblem) return error
  reportError(error)
  return new ApiProblem({ code: 'unexpected', status: 0, detail: sentenceOf(error) })
}

/** The sentence to show for anything that was thrown. */
export function sentenceOf(error: unknown): string {
  return error instanceof ApiProblem
    ? error.message
    : 'Something went wrong. Please load the page again.'
}
