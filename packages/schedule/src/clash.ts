/** Some units of an area, both ends included, counted from 1: bays 1 to 6. */
export interface AreaUnits {
  areaId: string
  fromUnit: number
  toUnit: number
}

/** What a session takes, and when: from `startsAt` to before `endsAt`. */
export interface TakenTime {
  id: string
  startsAt: Date
  endsAt: Date
  /** A session called off takes nothing. */
  isCalledOff: boolean
  coachIds: readonly string[]
  areas: readonly AreaUnits[]
}

interface Meeting {
  firstId: string
  secondId: string
  /** The time both want, from one instant to before another. */
  from: Date
  to: Date
}

/** Two sessions that want one coach, or a unit of one area, at one time. */
export type Clash =
  (Meeting & { kind: 'coach'; coachId: string }) | (Meeting & { kind: 'area' } & AreaUnits)

/**
 * Every clash among sessions: each pair once for each coach and each stretch of units they both
 * want, the one that starts earlier first, in order of time. Where one session ends as the other
 * begins nothing clashes.
 */
export function findClashes(sessions: readonly TakenTime[]): Clash[] {
  return sweep(sessions, () => true)
}

/**
 * Clashes of planned sessions with existing ones, not among either: what an editor shows before
 * anything is saved. An existing session with the id of a planned one is that session, and is left
 * out.
 */
export function findClashesBetween(given: {
  planned: readonly TakenTime[]
  existing: readonly TakenTime[]
}): Clash[] {
  const plannedIds = new Set(given.planned.map(({ id }) => id))
  const others = given.existing.filter(({ id }) => !plannedIds.has(id))
  return sweep(
    [...given.planned, ...others],
    (first, second) => plannedIds.has(first.id) !== plannedIds.has(second.id),
  )
}

/** Walks the sessions in order of start and holds each against those that are still going on. */
function sweep(
  sessions: readonly TakenTime[],
  isOfInterest: (first: TakenTime, second: TakenTime) => boolean,
): Clash[] {
  const inOrder = sessions
    .filter(({ isCalledOff, startsAt, endsAt }) => !isCalledOff && startsAt < endsAt)
    .sort((a, b) => +a.startsAt - +b.startsAt || +a.endsAt - +b.endsAt || compareIds(a, b))
  const clashes: Clash[] = []
  let going: TakenTime[] = []
  for (const session of inOrder) {
    going = going.filter(({ endsAt }) => endsAt > session.startsAt)
    for (const earlier of going) {
      if (isOfInterest(earlier, session)) clashes.push(...clashesOf(earlier, session))
    }
    going.push(session)
  }
  return clashes
}

function clashesOf(first: TakenTime, second: TakenTime): Clash[] {
  const meeting = {
    firstId: first.id,
    secondId: second.id,
    from: second.startsAt,
    to: first.endsAt < second.endsAt ? first.endsAt : second.endsAt,
  }
  const coaches = [...new Set(first.coachIds)]
    .filter((coachId) => second.coachIds.includes(coachId))
    .map((coachId): Clash => ({ kind: 'coach', coachId, ...meeting }))
  const areas = first.areas.flatMap((mine) =>
    second.areas.flatMap((theirs): Clash[] => {
      const shared = sharedUnits(mine, theirs)
      return shared ? [{ kind: 'area', ...shared, ...meeting }] : []
    }),
  )
  return [...coaches, ...areas]
}

function sharedUnits(mine: AreaUnits, theirs: AreaUnits): AreaUnits | null {
  if (mine.areaId !== theirs.areaId) return null
  const fromUnit = Math.max(mine.fromUnit, theirs.fromUnit)
  const toUnit = Math.min(mine.toUnit, theirs.toUnit)
  return fromUnit <= toUnit ? { areaId: mine.areaId, fromUnit, toUnit } : null
}

function compareIds(a: TakenTime, b: TakenTime): number {
  return a.id < b.id ? -1 : a.id > b.id ? 1 : 0
}
