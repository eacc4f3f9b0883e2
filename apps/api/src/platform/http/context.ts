import type { Answer, Parsed, Role, RouteKey, Scope } from '@marram/contract'
import type { Request, Response } from 'express'

export interface SignedInAccount {
  id: string
  name: string
  email: string
  isVerified: boolean
  hasPassword: boolean
}

/** What is known of the request when a handler runs: access has been checked by then. */
export interface RequestContext {
  requestId: string
  account: SignedInAccount | null
  /**
   * The academy of the address; null outside `/api/academies/{academy}`, and for a visitor of a
   * public page, which finds its academy by the slug while it is read.
   */
  academyId: string | null
  academySlug: string | null
  roles: readonly Role[]
  scope: Scope | null
  remoteAddress: string
  /** For the few handlers that must speak HTTP themselves (sign-in strategies). */
  http: { request: Request; response: Response }
  signIn(accountId: string): Promise<void>
  signOut(): Promise<void>
  token(): string
}

export interface Input<K extends RouteKey> {
  params: Parsed<K, 'params'>
  query: Parsed<K, 'query'>
  body: Parsed<K, 'body'>
}

/** A file instead of JSON. */
export class Download {
  readonly contentType: string
  readonly filename: string
  readonly text: string

  constructor(file: { contentType: string; filename: string; text: string }) {
    this.contentType = file.contentType
    this.filename = file.filename
    this.text = file.text
  }
}

export type Handler<K extends RouteKey> = (
  input: Input<K>,
  context: RequestContext,
) => Promise<Answer<K> | Download>

/** A feature's handlers, by route. */
export type Handlers = { [K in RouteKey]?: Handler<K> }

/** A context in which somebody is signed in. */
export type PersonContext = RequestContext & { account: SignedInAccount }
/** A context inside an academy. */
export type AcademyContext = RequestContext & { academyId: string; academySlug: string }
export type StaffContext = PersonContext & AcademyContext
