import type { z } from 'zod'
import { academySchemas } from './academies'
import { accountSchemas } from './accounts'
import { clinicSchemas } from './clinics'
import { coachingSchemas } from './coaching'
import { checkoutSchemas, enrolmentSchemas } from './enrolments'
import { golferSchemas } from './golfers'
import { ledgerSchemas } from './ledger'
import { registerSchemas } from './register'
import type { RouteKey } from './routes'
import { venueSchemas } from './venues'

export interface RouteSchemas {
  params?: z.ZodObject
  query?: z.ZodObject
  body?: z.ZodType
  response: z.ZodType
}

/** The shapes of every route: what it takes and what it answers. */
export const SCHEMAS = {
  ...accountSchemas,
  ...academySchemas,
  ...venueSchemas,
  ...golferSchemas,
  ...clinicSchemas,
  ...enrolmentSchemas,
  ...checkoutSchemas,
  ...registerSchemas,
  ...coachingSchemas,
  ...ledgerSchemas,
} as const satisfies Record<RouteKey, RouteSchemas>

type Schemas = typeof SCHEMAS
type PartOf<K extends RouteKey, P extends string> =
  Schemas[K] extends Record<P, infer S> ? S : never

/** What a handler gets after validation. */
export type Parsed<K extends RouteKey, P extends 'params' | 'query' | 'body'> =
  PartOf<K, P> extends z.ZodType ? z.output<PartOf<K, P>> : object

/** What a caller sends. */
export type Sent<K extends RouteKey, P extends 'params' | 'query' | 'body'> =
  PartOf<K, P> extends z.ZodType ? z.input<PartOf<K, P>> : undefined

/** What a route answers. */
export type Answer<K extends RouteKey> =
  PartOf<K, 'response'> extends z.ZodType ? z.output<PartOf<K, 'response'>> : never
