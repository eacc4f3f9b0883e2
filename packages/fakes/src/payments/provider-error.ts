/** A refusal as the provider's API words it: an HTTP status, a type and, for some, a code. */
export class ProviderError extends Error {
  readonly status: number
  readonly type: string
  readonly code: string | undefined
  readonly param: string | undefined

  constructor(
    status: number,
    message: string,
    options: { type?: string; code?: string; param?: string } = {},
  ) {
    super(message)
    this.status = status
    this.type = options.type ?? 'invalid_request_error'
    this.code = options.code
    this.param = options.param
  }
}

/** What is answered for an id that is not there, or is another account's. */
export function missing(what: string, id: string): ProviderError {
  return new ProviderError(404, `No such ${what}: '${id}'`, { code: 'resource_missing' })
}
