import type { RequestHandler } from 'express'

/** How the API can be made to misbehave, as it does in life. */
export interface TroubleControls {
  /** The next calls are answered with this status before anything is done. */
  failNext: (given: { status: number; count: number }) => void
  /** The next changes are carried out, but their answers are lost on the way. */
  loseNextAnswers: (count: number) => void
  /** Changes wait, and are at work all the while, until they are released. */
  holdRequests: () => void
  releaseRequests: () => void
}

export interface Trouble extends TroubleControls {
  /** Answers a call that was asked to fail. */
  intercept: RequestHandler
  /** Resolves when a change may be carried out. */
  passRequest: () => Promise<void>
  losesAnswer: () => boolean
}

export function makeTrouble(): Trouble {
  const failures: number[] = []
  let lost = 0
  const waiting: (() => void)[] = []
  let isHolding = false
  return {
    failNext: ({ status, count }) => void failures.push(...Array<number>(count).fill(status)),
    loseNextAnswers: (count) => void (lost += count),
    holdRequests: () => void (isHolding = true),
    releaseRequests() {
      isHolding = false
      for (const go of waiting.splice(0)) go()
    },
    intercept(_request, response, next) {
      const status = failures.shift()
      if (status === undefined) return next()
      response.status(status).json({ error: { type: 'api_error', message: 'Asked to fail.' } })
    },
    async passRequest() {
      if (isHolding) await new Promise<void>((resolve) => waiting.push(resolve))
    },
    losesAnswer() {
      if (lost === 0) return false
      lost -= 1
      return true
    },
  }
}
