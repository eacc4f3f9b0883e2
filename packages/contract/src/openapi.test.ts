import { Validator } from '@seriousme/openapi-schema-validator'
import { describe, expect, it } from 'vitest'
import { openApiDocument } from './openapi'
import { ROUTES, type RouteKey } from './routes'
import { SCHEMAS } from './schemas'

interface Operation {
  operationId: string
  security: object[]
  parameters?: { name: string; in: string; required: boolean }[]
  requestBody?: { content: Record<string, { schema: { additionalProperties?: unknown } }> }
  responses: Record<string, { content: Record<string, { schema: object }> }>
}

const document = openApiDocument({ publicUrl: 'https://marram.example' })
const paths = document['paths'] as Record<string, Record<string, Operation>>

function operationOf(key: RouteKey): Operation {
  const { method, path } = ROUTES[key]
  const operation = paths[path.replace(/:(\w+)/g, '{$1}')]?.[method.toLowerCase()]
  if (!operation) throw new Error(`${key} is missing`)
  return operation
}

describe('the OpenAPI document', () => {
  it('is valid by the rules of OpenAPI 3.1', async () => {
    // The validator takes what it checks apart, so it gets a copy.
    const { valid, errors } = await new Validator().validate(structuredClone(document))
    expect(errors).toBeUndefined()
    expect(valid).toBe(true)
  })

  it('has every route, once, and nothing else', () => {
    const found = Object.values(paths).flatMap((item) =>
      Object.values(item).map(({ operationId }) => operationId),
    )
    expect(found.toSorted()).toEqual(Object.keys(ROUTES).toSorted())
    for (const key of Object.keys(ROUTES) as RouteKey[]) {
      expect(operationOf(key).operationId).toBe(key)
    }
  })

  it('declares every part of a path, and no other', () => {
    for (const [path, item] of Object.entries(paths)) {
      const inPath = [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name)
      for (const { operationId, parameters = [] } of Object.values(item)) {
        const declared = parameters.filter((parameter) => parameter.in === 'path')
        expect(declared.map(({ name }) => name).toSorted(), operationId).toEqual(inPath.toSorted())
        expect(declared.every(({ required }) => required)).toBe(true)
      }
    }
  })

  it('takes a body where the route does, without unknown keys', () => {
    for (const key of Object.keys(ROUTES) as RouteKey[]) {
      const { requestBody } = operationOf(key)
      expect(requestBody !== undefined, key).toBe('body' in SCHEMAS[key])
      if (!requestBody) continue
      const schema = requestBody.content['application/json']?.schema
      expect(schema?.additionalProperties, key).toBe(false)
    }
  })

  it('refers to nothing that is not there', () => {
    const text = JSON.stringify(document)
    const { schemas } = document['components'] as { schemas: object }
    const referred = [...text.matchAll(/"#\/components\/schemas\/(\w+)"/g)].map(([, name]) => name)
    expect(new Set(referred)).toEqual(new Set(Object.keys(schemas)))
    expect(text).not.toContain('$defs')
  })

  it('says who may call: nobody need sign in, a cookie, and the token for changes', () => {
    expect(operationOf('page.read').security).toEqual([])
    expect(operationOf('session.sign-in').security).toEqual([{ token: [] }])
    expect(operationOf('enrolments.mine').security).toEqual([{ signIn: [] }])
    expect(operationOf('enrolments.hold').security).toEqual([{ signIn: [], token: [] }])
  })

  it('answers the export as text and everything else as JSON', () => {
    const kinds = (key: RouteKey) => Object.keys(operationOf(key).responses['200']?.content ?? {})
    expect(kinds('ledger.export')).toEqual(['text/csv'])
    expect(kinds('ledger.card')).toEqual(['application/json'])
  })
})
