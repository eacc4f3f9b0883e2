import { z } from 'zod'
import { academyView } from './academies'
import { sessionView } from './accounts'
import { clinicView, pageClinic, pageClinicDetail, sessionBrief } from './clinics'
import { coachingSettings } from './coaching'
import { comparisonView } from './comparison'
import { enrolmentView, giveUpQuote, placeView, waitlistView } from './enrolments'
import { golferListItem, golferView, ownGolferView } from './golfers'
import { problemSchema } from './problem-schema'
import { registerRow, registerView } from './register'
import { ROUTES, type Access, type RouteKey, type RouteSpec } from './routes'
import { SCHEMAS, type RouteSchemas } from './schemas'
import { swingView, targetView } from './swings'
import { areaView, coachView, venueView } from './venues'

type Json = Record<string, unknown>

/** What is answered in several places, by the name that it has in the document. */
const NAMED = {
  Academy: academyView,
  Area: areaView,
  Clinic: clinicView,
  Coach: coachView,
  CoachingSettings: coachingSettings,
  Comparison: comparisonView,
  Enrolment: enrolmentView,
  GiveUpQuote: giveUpQuote,
  Golfer: golferView,
  GolferListItem: golferListItem,
  OwnGolfer: ownGolferView,
  PageClinic: pageClinic,
  PageClinicDetail: pageClinicDetail,
  Place: placeView,
  Register: registerView,
  RegisterRow: registerRow,
  Session: sessionBrief,
  SignIn: sessionView,
  Swing: swingView,
  SwingTarget: targetView,
  Venue: venueView,
  WaitlistEntry: waitlistView,
}

/** The API as an OpenAPI 3.1 document, built from the routes and their schemas alone. */
export function openApiDocument({ publicUrl }: { publicUrl: string }): Json {
  const schemas: Json = { Problem: problemSchema }
  const paths: Record<string, Json> = {}
  for (const key of Object.keys(ROUTES) as RouteKey[]) {
    const { method, path } = ROUTES[key]
    const item = (paths[path.replace(/:(\w+)/g, '{$1}')] ??= {})
    item[method.toLowerCase()] = operationOf(key, schemas)
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Marram',
      version: '1',
      description: 'Groups, places, registers and books for golf academies.',
    },
    servers: [{ url: publicUrl }],
    paths,
    components: { schemas, responses: { Problem: problemResponse }, securitySchemes },
  }
}

function operationOf(key: RouteKey, schemas: Json): Json {
  const spec: RouteSpec = ROUTES[key]
  // Each route has parts of its own; here it matters only which there are.
  const parts: RouteSchemas = SCHEMAS[key]
  const parameters = [...pathParameters(spec, parts.params), ...parametersIn('query', parts.query)]
  return {
    operationId: key,
    tags: [key.split('.')[0]],
    description: accessInWords(spec.access),
    security: securityOf(spec),
    ...(parameters.length > 0 ? { parameters } : {}),
    ...(parts.body
      ? { requestBody: { required: true, content: jsonContent(taken(parts.body)) } }
      : {}),
    responses: {
      '200': { description: 'Done.', content: answerContent(parts.response, schemas) },
      '4XX': { $ref: '#/components/responses/Problem' },
      '5XX': { $ref: '#/components/responses/Problem' },
    },
  }
}

function pathParameters(spec: RouteSpec, params: z.ZodObject | undefined): Json[] {
  const isTenant = spec.path.includes(':academy')
  const academy = {
    name: 'academy',
    in: 'path',
    required: true,
    description: 'The address of the academy.',
    schema: { type: 'string' },
  }
  return [...(isTenant ? [academy] : []), ...parametersIn('path', params)]
}

function parametersIn(where: 'path' | 'query', object: z.ZodObject | undefined): Json[] {
  if (!object) return []
  // An object's JSON Schema always has properties; each is a schema.
  const { properties = {}, required = [] } = taken(object) as {
    properties?: Record<string, Json>
    required?: string[]
  }
  return Object.entries(properties).map(([name, schema]) => ({
    name,
    in: where,
    required: where === 'path' || required.includes(name),
    schema,
  }))
}

/** What a caller sends. */
function taken(schema: z.ZodType): Json {
  const { $schema: _, ...rest } = z.toJSONSchema(schema, { io: 'input' })
  return rest
}

/** What is answered; named parts move to the document's components. */
function answerContent(schema: z.ZodType, schemas: Json): Json {
  const made = z.toJSONSchema(schema, { io: 'output', metadata: names })
  const { $schema: _, $defs = {}, ...rest } = atComponents(made)
  Object.assign(schemas, $defs)
  if (rest['type'] === 'string') return { 'text/csv': { schema: rest } }
  return jsonContent(rest)
}

const names = z.registry<{ id: string }>()
for (const [id, schema] of Object.entries(NAMED)) names.add(schema, { id })

function atComponents(schema: object): Json {
  const text = JSON.stringify(schema).replaceAll('"#/$defs/', '"#/components/schemas/')
  return JSON.parse(text) as Json
}

const jsonContent = (schema: Json): Json => ({ 'application/json': { schema } })

function accessInWords(access: Access): string {
  if (access === 'public') return 'Nobody need be signed in.'
  if (access === 'account') return 'For anybody who is signed in.'
  return `Needs the permission ${access}.`
}

/** A change needs the token of its page as well; who reads needs no more than the sign-in. */
function securityOf({ method, access }: RouteSpec): Json[] {
  const token = method === 'GET' ? {} : { token: [] }
  if (access === 'public') return method === 'GET' ? [] : [token]
  return [{ signIn: [], ...token }]
}

const securitySchemes = {
  signIn: { type: 'apiKey', in: 'cookie', name: '__Host-marram' },
  token: {
    type: 'apiKey',
    in: 'header',
    name: 'x-marram-token',
    description: 'The token that GET /api/session gives, with the cookie that it sets.',
  },
}

const problemResponse = {
  description: 'A refusal, or trouble on our side, with a code that stays the same.',
  content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
}
