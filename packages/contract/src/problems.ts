/** Every stable problem code with the HTTP status it travels under. */
export const PROBLEM_STATUS = {
  'bad-request': 400,
  'not-signed-in': 401,
  'wrong-credentials': 401,
  'not-allowed': 403,
  'foreign-origin': 403,
  'not-found': 404,
  'already-there': 409,
  'changed-meanwhile': 409,
  clash: 409,
  'session-full': 409,
  'already-has-place': 409,
  'hold-lapsed': 409,
  'not-on-sale': 409,
  'golfer-does-not-fit': 409,
  'register-closed': 409,
  'register-not-ready': 409,
  'already-decided': 409,
  'payments-not-connected': 409,
  'too-large': 413,
  'wrong-content-type': 415,
  'link-not-valid': 410,
  'invalid-fields': 422,
  'too-many-attempts': 429,
  'provider-unavailable': 503,
  unexpected: 500,
} as const

export type ProblemCode = keyof typeof PROBLEM_STATUS

/** An `application/problem+json` document (RFC 9457) as Marram sends it. */
export interface ProblemDocument {
  type: string
  title: string
  status: number
  code: ProblemCode
  /** One sentence that says what happened and what to do. */
  detail: string
  requestId?: string
  /** For `invalid-fields`: a sentence for each wrong field, by its path ("golfer.name"). */
  fields?: Record<string, string>
}
