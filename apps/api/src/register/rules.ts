/** A register may be opened this long before its session, so that early golfers can be marked. */
const OPENS_BEFORE_MS = 60 * 60_000

export type RegisterRefusal = 'called-off' | 'closed' | 'too-early' | 'unmarked'

/** Why a mark cannot be set now, or null when it can. */
export function refusalToMark(
  session: { state: string; registerState: string; startsAt: Date },
  now: Date,
): RegisterRefusal | null {
  if (session.state === 'called-off') return 'called-off'
  if (session.registerState === 'closed') return 'closed'
  if (now.getTime() < session.startsAt.getTime() - OPENS_BEFORE_MS) return 'too-early'
  return null
}

/**
 * Says whether a press that arrives now was made after those that came before it. A phone's clock
 * counts, but never one that is ahead of ours; of two at the same moment the later arrival counts.
 */
export function isLastPress(press: {
  pressedAt: Date | null
  now: Date
  before: Date | null
}): boolean {
  const { pressedAt, now, before } = press
  if (!before) return true
  const madeAt = Math.min(pressedAt?.getTime() ?? now.getTime(), now.getTime())
  return madeAt >= before.getTime()
}

/** Why a register cannot be closed now. It can be once the session has begun and all are marked. */
export function refusalToClose(
  session: { state: string; startsAt: Date },
  given: { unmarked: number; now: Date },
): RegisterRefusal | null {
  if (session.state === 'called-off') return 'called-off'
  if (given.now.getTime() < session.startsAt.getTime()) return 'too-early'
  return given.unmarked > 0 ? 'unmarked' : null
}

/** What the coach reads under a golfer's name. */
export function noteOf(row: {
  notes: string
  hand: 'right' | 'left'
  lateBefore: number
  joinedAtNumber: number
  number: number
  sessionsTotal: number
}): string {
  if (row.notes) return row.notes
  if (row.lateBefore > 0) return `Late ${timesInWords(row.lateBefore)} so far`
  if (row.hand === 'left') return 'Left-handed'
  if (row.joinedAtNumber > 1) return `Joined at session ${row.joinedAtNumber}`
  return row.sessionsTotal > 1 ? `Session ${row.number} of ${row.sessionsTotal}` : ''
}

function timesInWords(count: number): string {
  return ['', 'once', 'twice'][count] ?? `${count} times`
}
