import type { Answer } from '@marram/contract'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import { darkMinutesIn } from './light'
import type { Session } from './models'
import { listSessionParts } from './queries'

export type SessionView = Answer<'sessions.change'>

/** Sessions as staff see them, with their coaches and areas. */
export async function viewSessions(
  trx: AcademyTrx,
  sessions: readonly Session[],
): Promise<SessionView[]> {
  const parts = await listSessionParts(
    trx,
    sessions.map(({ id }) => id),
  )
  return sessions.map((session) => {
    const { coaches = [], areas = [] } = parts.get(session.id) ?? {}
    return {
      id: session.id,
      number: session.number,
      startsAt: session.startsAt.toISOString(),
      endsAt: session.endsAt.toISOString(),
      duskAt: session.duskAt?.toISOString() ?? null,
      darkMinutes: darkMinutesIn(session, areas),
      capacity: session.capacity,
      taken: session.held + session.confirmed,
      state: session.state,
      calledOffReason: session.calledOffReason,
      registerState: session.registerState,
      coaches,
      areas,
    }
  })
}
