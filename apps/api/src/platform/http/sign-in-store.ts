import { createHash } from 'node:crypto'
import type { Request } from 'express'
import { Store, type Session, type SessionData } from 'express-session'
import type { Services } from '../services'

declare module 'express-session' {
  interface SessionData {
    accountId?: string
    sessionVersion?: number
    /** A checked path of ours to go back to after an identity provider. */
    returnTo?: string
  }
}

type Done<T> = (error: unknown, value?: T) => void

/**
 * Keeps sign-in sessions in PostgreSQL, under the hash of their id. A session that was ended stays
 * ended: saving one that is gone changes nothing, since only a new id may insert.
 */
export class SignInStore extends Store {
  readonly #services: Pick<Services, 'db' | 'clock'>
  /** Sessions that stand in the database; any other has an id that this process has just made. */
  readonly #kept = new WeakSet<SessionData>()

  constructor(services: Pick<Services, 'db' | 'clock'>) {
    super()
    this.#services = services
  }

  /** The library makes the session of a request here, from what was read. */
  override createSession(request: Request, data: SessionData): Session & SessionData {
    const session = super.createSession(request, data)
    this.#kept.add(session)
    return session
  }

  override get(id: string, done: Done<SessionData | null>): void {
    this.#read(id).then(
      (data) => done(null, data),
      (error: unknown) => done(error),
    )
  }

  /** Named, since every request asks it. */
  async #read(id: string): Promise<SessionData | null> {
    const { db, clock } = this.#services
    const { rows } = await db
      .raw<{ rows: { data: SessionData }[] }>(
        'SELECT data FROM sign_in_sessions WHERE id_hash = ? AND expires_at > ?',
        [hashOf(id), clock.now()],
      )
      .options({ name: 'sign-in-session' })
    return rows[0]?.data ?? null
  }

  override set(id: string, session: SessionData, done: Done<void> = () => {}): void {
    this.#save(id, session).then(
      () => done(null),
      (error: unknown) => done(error),
    )
  }

  override destroy(id: string, done: Done<void> = () => {}): void {
    this.#services
      .db('sign_in_sessions')
      .where({ idHash: hashOf(id) })
      .delete()
      .then(
        () => done(null),
        (error: unknown) => done(error),
      )
  }

  async #save(id: string, session: SessionData): Promise<void> {
    const { db, clock } = this.#services
    const row = {
      accountId: session.accountId ?? null,
      sessionVersion: session.sessionVersion ?? null,
      data: JSON.stringify(session),
      expiresAt: new Date(clock.now().getTime() + (session.cookie.originalMaxAge ?? 0)),
    }
    if (!this.#kept.has(session)) {
      const key = { idHash: hashOf(id), createdAt: clock.now() }
      await db('sign_in_sessions').insert({ ...key, ...row })
      this.#kept.add(session)
      return
    }
    await db('sign_in_sessions')
      .where({ idHash: hashOf(id) })
      .update(row)
  }
}

function hashOf(id: string): Buffer {
  return createHash('sha256').update(id).digest()
}
