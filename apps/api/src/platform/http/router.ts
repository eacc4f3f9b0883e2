import {
  ROUTES,
  SCHEMAS,
  isSlug,
  scopeOf,
  type Access,
  type Role,
  type RouteKey,
  type RouteSpec,
  type Scope,
} from '@marram/contract'
import { Router, type Request, type Response } from 'express'
import type { ZodType } from 'zod'
import { Problem, notFound } from '../errors'
import type { Services } from '../services'
import { readCaller } from './caller'
import { Download, type Handlers, type RequestContext } from './context'
import { fieldSentences } from './field-sentences'
import { signInAs, signOut } from './sign-in-session'
import { tokenOf } from './request-token'

type Schemas = Partial<Record<'params' | 'query' | 'body', ZodType>>

/**
 * Serves every route of the contract: checks who may call it, validates what came, and answers
 * with what the handler gives back. Refuses to start when a route has no handler.
 */
export function makeApiRouter(services: Services, handlers: Handlers): Router {
  const router = Router()
  const keys = Object.keys(ROUTES) as RouteKey[]
  const missing = keys.filter((key) => !handlers[key])
  if (missing.length > 0) throw new Error(`Routes without a handler: ${missing.join(', ')}.`)

  for (const key of keys) {
    const spec: RouteSpec = ROUTES[key]
    // Each route has its own shapes; what matters here is only that they parse.
    const schemas = SCHEMAS[key] as Schemas
    // Handlers were typed where they were declared; here every key is the same to us.
    const handler = handlers[key] as (input: object, context: RequestContext) => unknown
    const method = spec.method.toLowerCase() as 'get' | 'post' | 'put' | 'patch' | 'delete'
    router[method](spec.path, async (request, response) => {
      response.locals['route'] = key
      const context = await makeContext(services, spec, request, response)
      const { academy: _, ...params } = request.params
      const answer = await handler(
        {
          params: parse(schemas.params, params, 'not-found'),
          query: parse(schemas.query, request.query, 'invalid-fields'),
          body: parse(schemas.body, request.body, 'invalid-fields'),
        },
        context,
      )
      send(response, answer)
    })
  }
  return router
}

function send(response: Response, answer: unknown): void {
  response.setHeader('Cache-Control', 'no-store')
  if (answer instanceof Download) {
    response.setHeader('Content-Type', answer.contentType)
    response.setHeader('Content-Disposition', `attachment; filename="${answer.filename}"`)
    response.send(answer.text)
    return
  }
  response.json(answer ?? null)
}

function parse(
  schema: ZodType | undefined,
  value: unknown,
  refusal: 'not-found' | 'invalid-fields',
): unknown {
  if (!schema) {
    const isEmpty = value === undefined || JSON.stringify(value) === '{}'
    if (isEmpty || refusal === 'not-found') return {}
    throw new Problem('invalid-fields', 'This takes no fields.')
  }
  const read = schema.safeParse(value ?? {})
  if (read.success) return read.data
  if (refusal === 'not-found') throw notFound('page')
  const fields = fieldSentences(read.error)
  throw new Problem('invalid-fields', Object.values(fields)[0] ?? 'Some fields are wrong.', fields)
}

async function makeContext(
  services: Services,
  spec: RouteSpec,
  request: Request,
  response: Response,
): Promise<RequestContext> {
  const academySlug = slugOf(request)
  const { account, academyId, roles } = await readCaller(services, request, academySlug)
  if (spec.access !== 'public' && !account) {
    throw new Problem('not-signed-in', 'Please sign in first.')
  }
  // A visitor's look at a public page finds its academy with the page itself, in one message.
  if (academySlug && account && !academyId) throw notFound('academy')
  return {
    requestId: String(response.locals['requestId']),
    account,
    academyId,
    academySlug,
    roles,
    scope: checkAccess(spec.access, roles),
    remoteAddress: request.ip ?? '',
    http: { request, response },
    signIn: (accountId) => signInAs(services, request, accountId),
    signOut: () => signOut(request, response),
    token: () => tokenOf(services, request, response),
  }
}

function slugOf(request: Request): string | null {
  const slug = request.params['academy']
  if (typeof slug !== 'string') return null
  if (!isSlug(slug)) throw notFound('academy')
  return slug
}

/** Somebody with no staff role here learns nothing, not even that the page exists. */
function checkAccess(access: Access, roles: readonly Role[]): Scope | null {
  if (access === 'public' || access === 'account') return null
  const scope = scopeOf(roles, access)
  if (scope) return scope
  if (roles.length === 0) throw notFound('academy')
  throw new Problem('not-allowed', 'Your role here does not include this. Ask the owner.')
}
