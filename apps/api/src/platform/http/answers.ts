import type { ErrorRequestHandler, RequestHandler, Response } from 'express'
import { Problem, notFound, toProblemDocument } from '../errors'
import type { Services } from '../services'

/** Anything under /api that no route took. */
export const noSuchRoute: RequestHandler = () => {
  throw notFound('page')
}

/** Turns whatever was thrown into a problem document; what we did not expect is logged, not told. */
export function answerProblems({ log }: Pick<Services, 'log'>): ErrorRequestHandler {
  return (error: unknown, _request, response, next) => {
    if (response.headersSent) return next(error)
    const requestId = String(response.locals['requestId'])
    const problem = asProblem(error)
    response.locals['code'] = problem.code
    if (problem.code === 'unexpected') log.error({ requestId, err: error }, 'unexpected error')
    sendProblem(response, problem, requestId)
  }
}

export function sendProblem(response: Response, problem: Problem, requestId: string): void {
  const document = toProblemDocument(problem, requestId)
  response
    .status(document.status)
    .set('Cache-Control', 'no-store')
    .type('application/problem+json')
    .send(JSON.stringify(document))
}

function asProblem(error: unknown): Problem {
  if (error instanceof Problem) return error
  const { type, status } = Object(error) as { type?: string; status?: number }
  if (type === 'entity.too.large') return new Problem('too-large', 'This is more than 64 KiB.')
  if (type === 'encoding.unsupported') {
    return new Problem('wrong-content-type', 'Please send it without compression.')
  }
  if (status === 404) return notFound('page')
  if (typeof status === 'number' && status >= 400 && status < 500) {
    return new Problem('bad-request', 'The request could not be read.')
  }
  return new Problem(
    'unexpected',
    'Something went wrong on our side. Nothing was changed; please try again.',
  )
}
