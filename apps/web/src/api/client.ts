import type { Answer, Sent } from '@marram/contract'
import { ROUTES, pathOf, type ProblemDocument, type RouteKey } from '@marram/contract/routes'
import { ApiProblem, fromDocument, noConnection } from './problem'

type Part<K extends RouteKey, P extends 'params' | 'query' | 'body'> =
  Sent<K, P> extends undefined ? { [Name in P]?: undefined } : { [Name in P]: Sent<K, P> }

/** What a call carries, by its route. An academy's routes also take its address. */
export type CallInput<K extends RouteKey> = Part<K, 'query'> &
  Part<K, 'body'> &
  (Sent<K, 'params'> extends undefined ? object : { params: Sent<K, 'params'> }) & {
    academy?: string
    signal?: AbortSignal
  }

/** Calls a route of the API. Throws an `ApiProblem` with a sentence for every refusal. */
export async function call<K extends RouteKey>(key: K, input: CallInput<K>): Promise<Answer<K>> {
  const { method } = ROUTES[key]
  // Each route has its own shape; sending it takes only what all shapes share.
  const loose = input as {
    academy?: string
    params?: Record<string, string>
    query?: Record<string, string | undefined>
    body?: unknown
    signal?: AbortSignal
  }
  const path = addressOf(key, loose)
  const answer = await send(method, path, loose)
  if (method !== 'GET' && (await isOutOfDate(key, answer))) {
    // The token belongs to an earlier sign-in, of another tab or one that has ended: take the new
    // one and try once more.
    await send('GET', ROUTES['session.read'].path, {})
    return read<K>(await send(method, path, loose))
  }
  return read<K>(answer)
}

/** The address of a call with its query; also the key under which its answer is kept. */
export function addressOf(
  key: RouteKey,
  input: {
    academy?: string
    params?: Record<string, string>
    query?: Record<string, string | undefined>
  },
): string {
  const params = { ...input.params, ...(input.academy ? { academy: input.academy } : {}) }
  const given = Object.entries(input.query ?? {}).filter(
    (entry): entry is [string, string] => entry[1] !== undefined,
  )
  const query = given.length > 0 ? `?${new URLSearchParams(given).toString()}` : ''
  return `${pathOf(key, params)}${query}`
}

async function send(
  method: string,
  path: string,
  { body, signal }: { body?: unknown; signal?: AbortSignal },
): Promise<Response> {
  try {
    if (method !== 'GET' && !tokenCookie()) await fetch(ROUTES['session.read'].path)
    return await fetch(path, {
      method,
      headers: {
        accept: 'application/json',
        'x-marram-token': tokenCookie(),
        ...(body === undefined ? {} : { 'content-type': 'application/json' }),
      },
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
      ...(signal ? { signal } : {}),
    })
  } catch (error) {
    if (signal?.aborted) throw error
    throw noConnection()
  }
}

async function isOutOfDate(key: RouteKey, response: Response): Promise<boolean> {
  if (response.status !== 403 && response.status !== 401) return false
  const code = await codeOf(response.clone())
  // A public route asks for no sign-in, so what is missing there is a token of now.
  return code === 'foreign-origin' || (code === 'not-signed-in' && ROUTES[key].access === 'public')
}

/** The code of a refusal; undefined where it is not the API that refused, but something before it. */
async function codeOf(response: Response): Promise<string | undefined> {
  if (!isJson(response)) return undefined
  // A refusal in JSON is a problem document: the API writes no other.
  const document = (await response.json()) as ProblemDocument
  return document.code
}

const isJson = (response: Response): boolean =>
  (response.headers.get('content-type') ?? '').includes('json')

async function read<K extends RouteKey>(response: Response): Promise<Answer<K>> {
  if (!isJson(response)) {
    const detail = 'The server gave an answer that this page does not understand.'
    throw new ApiProblem({ code: 'unexpected', status: response.status, detail })
  }
  const answer: unknown = await response.json()
  // A refusal in JSON is a problem document: the API writes no other.
  if (!response.ok) throw fromDocument(answer as ProblemDocument)
  // The contract says what this route answers; the API's tests hold it to that.
  return answer as Answer<K>
}

function tokenCookie(): string {
  return /(?:^|;\s*)marram-token=([^;]*)/.exec(document.cookie)?.[1] ?? ''
}
