import type { Answer, Parsed } from '@marram/contract'
import { readAcademy } from '../academies/academies'
import {
  isCoachOfClinic,
  findClinic,
  listSessionsBetween,
  listSessionsOf,
  updateSession,
  viewSessions,
  type Session,
} from '../clinics/clinics'
import { duskOver } from '../clinics/light'
import { findReachableSession, lockReachableSession, type SessionReach } from '../clinics/sessions'
import { findCoachOf, findCoaches } from '../coaches/coaches'
import { findPlace } from '../enrolments/enrolments'
import { isMinor } from '../golfers/golfers'
import { Problem, notFound } from '../platform/errors'
import { newId } from '../platform/ids'
import { invariant } from '../platform/invariant'
import type { Services } from '../platform/services'
import { inAcademy, type AcademyTrx } from '../platform/tenancy/transaction'
import { findVenue } from '../venues/venues'
import type { Mark } from './models'
import {
  findLastPress,
  insertMarkChange,
  listCardRows,
  listRegisterHeads,
  listRegisterRows,
  readCardMoney,
  removeMark,
  setMark,
  type RowOfRegister,
} from './queries'
import { isLastPress, noteOf, refusalToClose, refusalToMark, type RegisterRefusal } from './rules'

type RegisterView = Answer<'register.read'>

const REFUSALS: Record<RegisterRefusal, Problem> = {
  'called-off': new Problem('already-decided', 'This session has been called off.'),
  closed: new Problem(
    'register-closed',
    'This register is closed. Open it again to change a mark.',
  ),
  'too-early': new Problem('register-not-ready', 'This session has not begun yet.'),
  unmarked: new Problem('register-not-ready', 'Some golfers are not marked yet.'),
}

export async function readRegister(
  { db }: Services,
  { reach, sessionId }: { reach: SessionReach; sessionId: string },
): Promise<RegisterView> {
  return inAcademy(db, reach.academyId, async (trx) => {
    return viewOne(trx, await findReachableSession(trx, { reach, sessionId }))
  })
}

/** The registers of a day: a coach's own, everybody's for the owner and the desk. */
export async function readDay(
  { db }: Services,
  { reach, dayLocal }: { reach: SessionReach; dayLocal: string },
): Promise<Answer<'register.day'>> {
  return inAcademy(db, reach.academyId, async (trx) => {
    const { zone, duskKind } = await readAcademy(trx)
    const coach = await findCoachOf(trx, reach.accountId)
    const isOwnOnly = reach.scope === 'own'
    const nobody = isOwnOnly && !coach
    const sessions = nobody
      ? []
      : await listSessionsBetween(trx, {
          from: dayLocal,
          to: dayLocal,
          ...(isOwnOnly && coach ? { coachId: coach.id } : {}),
        })
    const [first] = sessions
    const clinic = first && (await findClinic(trx, first.clinicId))
    const venue = clinic && (await findVenue(trx, clinic.venueId))
    const dusk = venue ? duskOver(venue, { dayLocal, duskKind }) : null
    return {
      zone,
      dayLocal,
      duskAt: dusk?.toISOString() ?? null,
      registers: await viewRegisters(trx, sessions),
    }
  })
}

/**
 * Sets a golfer's mark, or takes it away with `null`. The last press counts, by when it was pressed
 * and not by when it arrived; every press is kept.
 */
export async function markPlace(
  { db, clock }: Services,
  given: {
    reach: SessionReach
    sessionId: string
    placeId: string
    press: Parsed<'register.mark', 'body'>
  },
): Promise<Answer<'register.mark'>> {
  const { reach, sessionId, placeId, press } = given
  return inAcademy(db, reach.academyId, async (trx) => {
    const session = await lockReachableSession(trx, { reach, sessionId })
    const now = clock.now()
    const refusal = refusalToMark(session, now)
    if (refusal) throw REFUSALS[refusal]
    const place = await findPlace(trx, placeId)
    if (place?.sessionId !== sessionId || place.state !== 'confirmed') throw notFound('place')
    const mark: Mark | null = press.mark
    const pressedAt = press.markedAt ? new Date(press.markedAt) : null
    const by = { placeId, markedBy: reach.accountId, markedAt: now, pressedAt }
    const isLast = isLastPress({ pressedAt, now, before: await findLastPress(trx, placeId) })
    await insertMarkChange(trx, { id: newId(now), ...by, mark })
    if (!isLast) return rowOf(trx, session, placeId)
    if (mark) await setMark(trx, { ...by, sessionId, mark })
    else await removeMark(trx, placeId)
    return rowOf(trx, session, placeId)
  })
}

async function rowOf(
  trx: AcademyTrx,
  session: Session,
  placeId: string,
): Promise<Answer<'register.mark'>> {
  const { rows } = await viewOne(trx, session)
  const row = rows.find((entry) => entry.placeId === placeId)
  invariant(row, 'a confirmed place is in its register')
  return row
}

/** Closes a register once everybody is marked. Closing earns the session's money. */
export async function closeRegister(
  services: Services,
  given: { reach: SessionReach; sessionId: string; revision: number },
): Promise<RegisterView> {
  const { reach, sessionId } = given
  return inAcademy(services.db, reach.academyId, async (trx) => {
    const session = await lockReachableSession(trx, { reach, sessionId })
    // A second press of the same closing finds it done.
    if (session.registerState === 'closed') return viewOne(trx, session)
    refuseOtherRevision(session, given.revision)
    const now = services.clock.now()
    const { rows } = await viewOne(trx, session)
    const unmarked = rows.filter(({ mark }) => mark === null).length
    const refusal = refusalToClose(session, { unmarked, now })
    if (refusal) throw REFUSALS[refusal]
    const change = {
      registerState: 'closed',
      registerRevision: session.registerRevision + 1,
      registerClosedAt: now,
      registerClosedBy: reach.accountId,
    } as const
    await updateSession(trx, sessionId, change)
    const { academyId } = reach
    const event = { academyId, sessionId, revision: change.registerRevision }
    await services.outbox.emit(trx, 'register.closed', event)
    return viewOne(trx, Object.assign(session, change))
  })
}

/** Opens a closed register again; what it earned is taken back until it is closed once more. */
export async function reopenRegister(
  services: Services,
  given: { reach: SessionReach; sessionId: string; revision: number },
): Promise<RegisterView> {
  const { reach, sessionId } = given
  return inAcademy(services.db, reach.academyId, async (trx) => {
    const session = await lockReachableSession(trx, { reach, sessionId })
    if (session.registerState === 'open') return viewOne(trx, session)
    refuseOtherRevision(session, given.revision)
    const change = {
      registerState: 'open',
      registerClosedAt: null,
      registerClosedBy: null,
    } as const
    await updateSession(trx, sessionId, change)
    const { academyId } = reach
    const event = { academyId, sessionId, revision: session.registerRevision }
    await services.outbox.emit(trx, 'register.reopened', event)
    return viewOne(trx, Object.assign(session, change))
  })
}

function refuseOtherRevision(session: Session, revision: number): void {
  if (session.registerRevision !== revision) {
    throw new Problem(
      'changed-meanwhile',
      'Somebody else closed or opened this register. Look again.',
    )
  }
}

async function viewOne(trx: AcademyTrx, session: Session): Promise<RegisterView> {
  const [view] = await viewRegisters(trx, [session])
  invariant(view, 'one session gives one register')
  return view
}

async function viewRegisters(
  trx: AcademyTrx,
  sessions: readonly Session[],
): Promise<RegisterView[]> {
  const ids = sessions.map(({ id }) => id)
  const briefs = await viewSessions(trx, sessions)
  const heads = await listRegisterHeads(trx, ids)
  const rows = await listRegisterRows(trx, ids)
  return sessions.map((session, index) => {
    const brief = briefs[index]
    const head = heads.get(session.id)
    invariant(brief && head, 'a session has a brief and a head')
    const { clinicTitle, sessionsTotal, zone, closedBy } = head
    return {
      session: { ...brief, clinicId: session.clinicId, clinicTitle, sessionsTotal, zone },
      revision: session.registerRevision,
      closedAt: session.registerClosedAt?.toISOString() ?? null,
      closedBy,
      rows: rows
        .filter(({ sessionId }) => sessionId === session.id)
        .map((row) => viewRow(row, { ...session, sessionsTotal })),
    }
  })
}

function viewRow(
  row: RowOfRegister,
  session: { number: number; heldOn: string; sessionsTotal: number },
): RegisterView['rows'][number] {
  return {
    placeId: row.placeId,
    golferId: row.golferId,
    name: row.name,
    mark: row.mark,
    markedBy: row.markedBy,
    markedAt: row.markedAt?.toISOString() ?? null,
    handicap: row.handicap,
    hand: row.hand,
    isJunior: isMinor(row, session.heldOn),
    note: noteOf({ ...row, ...session }),
    lateBefore: row.lateBefore,
    joinedAtNumber: row.joinedAtNumber,
    isUnpaid: row.isUnpaid,
  }
}

/**
 * The card of a clinic: golfers down, sessions across, and the money on it for those who may read
 * the ledger.
 */
export async function readCard(
  { db }: Services,
  given: { reach: SessionReach; clinicId: string; mayReadMoney: boolean },
): Promise<Answer<'register.card'>> {
  const { reach, clinicId, mayReadMoney } = given
  return inAcademy(db, reach.academyId, async (trx) => {
    const clinic = await findClinic(trx, clinicId)
    const { accountId, scope } = reach
    const isTheirs = scope === 'all' || (await isCoachOfClinic(trx, { clinicId, accountId }))
    if (!clinic || !isTheirs) throw notFound('clinic')
    const sessions = await listSessionsOf(trx, clinicId)
    const numbers = new Map(sessions.map(({ id, number }) => [id, number]))
    const cards = new Map<string, Answer<'register.card'>['rows'][number]>()
    for (const row of await listCardRows(trx, clinicId)) {
      const { golferId, name, enrolmentId } = row
      let card = cards.get(golferId)
      if (!card) {
        const note = cardNote(row, numbers.get(row.sessionId) ?? 1)
        card = { golferId, name, note, enrolmentId, marks: {} }
        cards.set(golferId, card)
      }
      card.marks[row.sessionId] = row.mark ?? 'not-yet'
    }
    const [first] = await viewSessions(trx, sessions.slice(0, 1))
    const coachIds = (first?.coaches ?? []).map(({ id }) => id)
    const coaches = await findCoaches(trx, coachIds)
    return {
      coaches: coaches.map(({ id, name, initials }) => ({ id, name, initials })),
      rows: [...cards.values()],
      money: mayReadMoney ? await readCardMoney(trx, clinicId) : null,
    }
  })
}

function cardNote(
  row: { handicap: number | null; hand: 'right' | 'left' },
  firstNumber: number,
): string {
  const parts = [
    row.handicap === null ? '' : `Hcp ${row.handicap}`,
    row.hand === 'left' ? 'left-handed' : '',
    firstNumber > 1 ? `joined at session ${firstNumber}` : '',
  ]
  return parts.filter(Boolean).join(', ')
}
