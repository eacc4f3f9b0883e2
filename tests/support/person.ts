import type { Answer, ProblemDocument, RouteKey, Sent } from '@marram/contract'
import { ROUTES, pathOf } from '@marram/contract'

export interface Reply<T> {
  status: number
  /** The answer of a call that went well; reading it after a refusal is a mistake of the test. */
  answer: T
  problem: ProblemDocument | null
  text: string
  /** Where a redirect leads; empty without one. */
  location: string
}

export interface CallOptions<K extends RouteKey> {
  params?: Record<string, string>
  query?: Record<string, string>
  body?: Sent<K, 'body'>
  /** Replaces the token or the origin, to see them refused. */
  headers?: Record<string, string>
}

/** Somebody with a browser: keeps cookies and sends the token and the origin that a page would. */
export class Person {
  readonly #baseUrl: string
  readonly #cookies = new Map<string, string>()
  readonly #lines = new Map<string, string>()
  #token = ''

  constructor(baseUrl: string) {
    this.#baseUrl = baseUrl
  }

  /** Calls a route of the contract, typed by it. */
  async call<K extends RouteKey>(key: K, options: CallOptions<K> = {}): Promise<Reply<Answer<K>>> {
    const { method } = ROUTES[key]
    if (method !== 'GET' && !this.#token) await this.#fetchToken()
    const query = options.query ? `?${new URLSearchParams(options.query)}` : ''
    const path = `${pathOf(key, options.params ?? {})}${query}`
    const reply = await this.send(method, path, options.body, options.headers)
    if (key.startsWith('session.') || key.startsWith('accounts.')) this.#token = ''
    return reply as Reply<Answer<K>>
  }

  /** As `call`, for calls that must go well. */
  async must<K extends RouteKey>(key: K, options: CallOptions<K> = {}): Promise<Answer<K>> {
    const reply = await this.call(key, options)
    if (reply.status >= 400) throw new Error(`${key}: ${reply.status} ${reply.text}`)
    return reply.answer
  }

  /** Sends anything at all, as a hostile page or a broken phone might. */
  async send(
    method: string,
    path: string,
    body?: unknown,
    headers: Record<string, string> = {},
  ): Promise<Reply<unknown>> {
    const isRaw = typeof body === 'string' || body instanceof Uint8Array
    const response = await fetch(`${this.#baseUrl}${path}`, {
      method,
      redirect: 'manual',
      headers: {
        cookie: [...this.#cookies].map(([name, value]) => `${name}=${value}`).join('; '),
        origin: this.#baseUrl,
        'x-marram-token': this.#token,
        ...(body === undefined ? {} : { 'content-type': 'application/json' }),
        ...headers,
      },
      // Raw bodies go out as they are: that is what they are for.
      ...(body === undefined ? {} : { body: isRaw ? (body as BodyInit) : JSON.stringify(body) }),
    })
    for (const line of response.headers.getSetCookie()) this.#keep(line)
    const text = await response.text()
    const type = response.headers.get('content-type') ?? ''
    const parsed: unknown = type.includes('json') && text ? JSON.parse(text) : text
    const isProblem = type.includes('problem+json')
    return {
      status: response.status,
      answer: parsed,
      problem: isProblem ? (parsed as ProblemDocument) : null,
      text,
      location: response.headers.get('location') ?? '',
    }
  }

  cookie(name: string): string | undefined {
    return this.#cookies.get(name)
  }

  /** The line in which a cookie was last set, with all that it says of it. */
  cookieLine(name: string): string | undefined {
    return this.#lines.get(name)
  }

  /** Puts a cookie there that somebody else was given. */
  putCookie(name: string, value: string): void {
    this.#cookies.set(name, value)
  }

  async #fetchToken(): Promise<void> {
    const { answer } = await this.send('GET', ROUTES['session.read'].path)
    this.#token = (answer as Answer<'session.read'>).token
  }

  #keep(line: string): void {
    const [pair = ''] = line.split(';')
    const at = pair.indexOf('=')
    const value = pair.slice(at + 1)
    this.#lines.set(pair.slice(0, at), line)
    if (value) this.#cookies.set(pair.slice(0, at), value)
    else this.#cookies.delete(pair.slice(0, at))
  }
}
