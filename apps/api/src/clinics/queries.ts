import { raw } from 'objection'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import { Clinic, ClinicArea, ClinicCoach, Session } from './models'

export interface AreaUse {
  areaId: string
  fromUnit: number
  toUnit: number
}

export async function findClinic(trx: AcademyTrx, id: string): Promise<Clinic | undefined> {
  return Clinic.query(trx).where({ id }).first()
}

/** Locks the clinic, so that two changes of its dates cannot cross. */
export async function lockClinic(trx: AcademyTrx, id: string): Promise<Clinic | undefined> {
  return Clinic.query(trx).where({ id }).forUpdate().first()
}

export async function listSlugsLike(trx: AcademyTrx, slug: string): Promise<string[]> {
  const rows = await Clinic.query(trx).where('slug', 'like', `${slug}%`).select('slug')
  return rows.map((row) => row.slug)
}

/** Resolves to false when another clinic has the address. */
export async function insertClinic(trx: AcademyTrx, row: Partial<Clinic>): Promise<boolean> {
  const { id } = row
  await Clinic.query(trx).insert(row).onConflict(['academy_id', 'slug']).ignore()
  return (await Clinic.query(trx).where({ id }).resultSize()) === 1
}

export async function updateClinic(
  trx: AcademyTrx,
  id: string,
  change: Partial<Clinic>,
): Promise<void> {
  await Clinic.query(trx).patch(change).where({ id })
}

export async function deleteClinic(trx: AcademyTrx, id: string): Promise<void> {
  await Clinic.query(trx).delete().where({ id })
}

/** Replaces who teaches a clinic and where. */
export async function setClinicParts(
  trx: AcademyTrx,
  clinicId: string,
  { coachIds, areas }: { coachIds: readonly string[]; areas: readonly AreaUse[] },
): Promise<void> {
  await ClinicCoach.query(trx).delete().where({ clinicId })
  await ClinicArea.query(trx).delete().where({ clinicId })
  for (const [position, coachId] of coachIds.entries()) {
    await ClinicCoach.query(trx).insert({ clinicId, coachId, position })
  }
  for (const [position, area] of areas.entries()) {
    await ClinicArea.query(trx).insert({ clinicId, ...area, position })
  }
}

export async function readClinicParts(
  trx: AcademyTrx,
  clinicId: string,
): Promise<{ coachIds: string[]; areas: AreaUse[] }> {
  const coaches = await ClinicCoach.query(trx).where({ clinicId }).orderBy('position')
  const areas = await ClinicArea.query(trx).where({ clinicId }).orderBy('position')
  return {
    coachIds: coaches.map(({ coachId }) => coachId),
    areas: areas.map(({ areaId, fromUnit, toUnit }) => ({ areaId, fromUnit, toUnit })),
  }
}

export async function listSessionsOf(trx: AcademyTrx, clinicId: string): Promise<Session[]> {
  return Session.query(trx).where({ clinicId }).orderBy('number')
}

/** As `listSessionsOf`, with their seats locked, so that nobody takes one meanwhile. */
export async function lockSessionsOf(trx: AcademyTrx, clinicId: string): Promise<Session[]> {
  return Session.query(trx).where({ clinicId }).orderBy('id').forNoKeyUpdate()
}

export async function findSession(trx: AcademyTrx, id: string): Promise<Session | undefined> {
  return Session.query(trx).where({ id }).first()
}

/** Locks a session against other changes; what merely refers to it can be written all the same. */
export async function lockSession(trx: AcademyTrx, id: string): Promise<Session | undefined> {
  return Session.query(trx).where({ id }).forNoKeyUpdate().first()
}

export async function insertSession(trx: AcademyTrx, row: Partial<Session>): Promise<void> {
  await Session.query(trx).insert(row)
}

export async function updateSession(
  trx: AcademyTrx,
  id: string,
  change: Partial<Session>,
): Promise<void> {
  await Session.query(trx).patch(change).where({ id })
}

export async function deleteSessions(trx: AcademyTrx, ids: readonly string[]): Promise<void> {
  if (ids.length > 0)
    await Session.query(trx)
      .delete()
      .whereIn('id', [...ids])
}

/** How many places of any state hang on these sessions. */
export async function countPlacesOf(trx: AcademyTrx, ids: readonly string[]): Promise<number> {
  const { rows } = await trx.raw<{ rows: { count: number }[] }>(
    'SELECT count(*) AS count FROM places WHERE session_id = ANY(?)',
    [[...ids]],
  )
  return rows[0]?.count ?? 0
}

export async function countWaiting(trx: AcademyTrx, clinicId: string): Promise<number> {
  const { rows } = await trx.raw<{ rows: { count: number }[] }>(
    "SELECT count(*) AS count FROM waitlist_entries WHERE clinic_id = ? AND state = 'waiting'",
    [clinicId],
  )
  return rows[0]?.count ?? 0
}

export interface SessionParts {
  sessionId: string
  startsAt: Date
  endsAt: Date
  coachIds: readonly string[]
  areas: readonly AreaUse[]
  /** False for a draft or a called-off session, which keep nobody from anything. */
  isLive: boolean
}

/** Replaces who takes a session and which units it has. The database refuses a clash. */
export async function setSessionParts(trx: AcademyTrx, parts: SessionParts): Promise<void> {
  const { sessionId, startsAt, endsAt, coachIds, areas, isLive } = parts
  await trx('sessionCoaches').where({ sessionId }).delete()
  await trx('sessionAreas').where({ sessionId }).delete()
  const during = trx.raw("tstzrange(?, ?, '[)')", [startsAt, endsAt])
  const academyId = trx.raw("current_setting('app.academy_id')::uuid")
  await trx('sessionCoaches').insert(
    coachIds.map((coachId, position) => ({
      academyId,
      sessionId,
      coachId,
      position,
      during,
      isLive,
    })),
  )
  await trx('sessionAreas').insert(
    areas.map(({ areaId, fromUnit, toUnit }, position) => ({
      academyId,
      sessionId,
      areaId,
      position,
      units: trx.raw("int4range(?, ?, '[]')", [fromUnit, toUnit]),
      during,
      isLive,
    })),
  )
}

/** Gives a clinic's planned sessions their claim on coaches and bays, or takes it back. */
export async function setClinicLive(
  trx: AcademyTrx,
  { clinicId, isLive }: { clinicId: string; isLive: boolean },
): Promise<void> {
  for (const table of ['session_coaches', 'session_areas']) {
    await trx.raw(
      `UPDATE ${table} AS part SET is_live = ? FROM sessions s
       WHERE s.academy_id = part.academy_id AND s.id = part.session_id
         AND s.clinic_id = ? AND s.state = 'planned'`,
      [isLive, clinicId],
    )
  }
}

export async function releaseSessionParts(trx: AcademyTrx, sessionId: string): Promise<void> {
  await trx('sessionCoaches').where({ sessionId }).update({ isLive: false })
  await trx('sessionAreas').where({ sessionId }).update({ isLive: false })
}

export interface SessionPartRow {
  sessionId: string
  coaches: { id: string; name: string; initials: string }[]
  areas: {
    id: string
    name: string
    hasLamps: boolean
    isCovered: boolean
    fromUnit: number
    toUnit: number
  }[]
}

/** Coaches and areas of sessions, by session. */
export async function listSessionParts(
  trx: AcademyTrx,
  sessionIds: readonly string[],
): Promise<Map<string, SessionPartRow>> {
  const { rows } = await trx.raw<{ rows: SessionPartRow[] }>(
    `SELECT s.id AS session_id,
       (SELECT coalesce(json_agg(json_build_object(
            'id', c.id, 'name', c.name, 'initials', c.initials) ORDER BY sc.position), '[]')
          FROM session_coaches sc
          JOIN coaches c ON c.academy_id = sc.academy_id AND c.id = sc.coach_id
          WHERE sc.academy_id = s.academy_id AND sc.session_id = s.id) AS coaches,
       (SELECT coalesce(json_agg(json_build_object(
            'id', a.id, 'name', a.name, 'hasLamps', a.has_lamps, 'isCovered', a.is_covered,
            'fromUnit', lower(sa.units), 'toUnit', upper(sa.units) - 1)
            ORDER BY sa.position), '[]')
          FROM session_areas sa
          JOIN areas a ON a.academy_id = sa.academy_id AND a.id = sa.area_id
          WHERE sa.academy_id = s.academy_id AND sa.session_id = s.id) AS areas
     FROM sessions s WHERE s.id = ANY(?)`,
    [[...sessionIds]],
  )
  return new Map(rows.map((row) => [row.sessionId, row]))
}

export interface BusyRow {
  sessionId: string
  startsAt: Date
  endsAt: Date
  clinicTitle: string
  coachIds: string[]
  areas: AreaUse[]
}

/** Live sessions of other clinics that use any of these coaches or areas in a span of time. */
export async function listBusy(
  trx: AcademyTrx,
  wanted: {
    from: Date
    to: Date
    coachIds: readonly string[]
    areaIds: readonly string[]
    exceptClinicId: string | null
    exceptSessionId: string | null
  },
): Promise<BusyRow[]> {
  const { rows } = await trx.raw<{ rows: BusyRow[] }>(
    `SELECT s.id AS session_id, s.starts_at, s.ends_at, c.title AS clinic_title,
       (SELECT coalesce(json_agg(sc.coach_id), '[]') FROM session_coaches sc
          WHERE sc.session_id = s.id AND sc.is_live) AS coach_ids,
       (SELECT coalesce(json_agg(json_build_object('areaId', sa.area_id,
            'fromUnit', lower(sa.units), 'toUnit', upper(sa.units) - 1)), '[]')
          FROM session_areas sa WHERE sa.session_id = s.id AND sa.is_live) AS areas
     FROM sessions s JOIN clinics c ON c.academy_id = s.academy_id AND c.id = s.clinic_id
     WHERE s.state = 'planned' AND s.starts_at < :to AND s.ends_at > :from
       AND (:exceptClinicId::uuid IS NULL OR s.clinic_id <> :exceptClinicId)
       AND (:exceptSessionId::uuid IS NULL OR s.id <> :exceptSessionId)
       AND (EXISTS (SELECT 1 FROM session_coaches sc WHERE sc.session_id = s.id AND sc.is_live
                      AND sc.coach_id = ANY(:coachIds))
         OR EXISTS (SELECT 1 FROM session_areas sa WHERE sa.session_id = s.id AND sa.is_live
                      AND sa.area_id = ANY(:areaIds)))`,
    { ...wanted, coachIds: [...wanted.coachIds], areaIds: [...wanted.areaIds] },
  )
  return rows
}

export interface ClinicListRow extends Clinic {
  sessionsHeld: number
  sessionsTotal: number
  nextStartsAt: Date | null
  firstStartsAt: Date | null
  lastStartsAt: Date | null
  taken: number
  waiting: number
  coaches: { id: string; name: string; initials: string }[]
}

/** Every clinic with what a list says of it; the next to be held first, the past ones last. */
export async function listClinics(trx: AcademyTrx, now: Date): Promise<ClinicListRow[]> {
  return Clinic.query(trx)
    .select(
      'clinics.*',
      raw(`(SELECT count(*) FROM sessions s WHERE s.academy_id = clinics.academy_id
             AND s.clinic_id = clinics.id AND s.register_state = 'closed')`).as('sessionsHeld'),
      raw(`(SELECT count(*) FROM sessions s WHERE s.academy_id = clinics.academy_id
             AND s.clinic_id = clinics.id)`).as('sessionsTotal'),
      raw(
        `(SELECT min(s.starts_at) FROM sessions s WHERE s.academy_id = clinics.academy_id
            AND s.clinic_id = clinics.id AND s.state = 'planned' AND s.ends_at > ?)`,
        [now],
      ).as('nextStartsAt'),
      raw(`(SELECT min(s.starts_at) FROM sessions s WHERE s.academy_id = clinics.academy_id
             AND s.clinic_id = clinics.id)`).as('firstStartsAt'),
      raw(`(SELECT max(s.starts_at) FROM sessions s WHERE s.academy_id = clinics.academy_id
             AND s.clinic_id = clinics.id)`).as('lastStartsAt'),
      raw(
        `(SELECT coalesce(max(s.held + s.confirmed), 0) FROM sessions s
           WHERE s.academy_id = clinics.academy_id AND s.clinic_id = clinics.id
             AND s.state = 'planned' AND s.ends_at > ?)`,
        [now],
      ).as('taken'),
      raw(`(SELECT count(*) FROM waitlist_entries w WHERE w.academy_id = clinics.academy_id
             AND w.clinic_id = clinics.id AND w.state = 'waiting')`).as('waiting'),
      raw(`(SELECT coalesce(json_agg(json_build_object(
               'id', c.id, 'name', c.name, 'initials', c.initials) ORDER BY cc.position), '[]')
             FROM clinic_coaches cc
             JOIN coaches c ON c.academy_id = cc.academy_id AND c.id = cc.coach_id
             WHERE cc.academy_id = clinics.academy_id AND cc.clinic_id = clinics.id)`).as(
        'coaches',
      ),
    )
    .orderByRaw(`"next_starts_at" ASC NULLS LAST, "last_starts_at" DESC, clinics.id`)
    .castTo<ClinicListRow[]>()
}

export interface SessionOnBoardRow extends Session {
  clinicTitle: string
  zone: string
}

/**
 * Sessions held on some days, the last one included, each by the calendar of its own venue. Drafts
 * are left out.
 */
export async function listSessionsBetween(
  trx: AcademyTrx,
  { from, to, coachId }: { from: string; to: string; coachId?: string },
): Promise<SessionOnBoardRow[]> {
  const query = Session.query(trx)
    .join('clinics', (join) =>
      join.on('clinics.academyId', 'sessions.academyId').on('clinics.id', 'sessions.clinicId'),
    )
    .whereBetween('sessions.heldOn', [from, to])
    .whereNot('clinics.state', 'draft')
    .select('sessions.*', 'clinics.title as clinicTitle', 'clinics.zone as zone')
    .orderBy(['sessions.startsAt', 'sessions.id'])
  if (coachId) {
    query.whereRaw(
      `EXISTS (SELECT 1 FROM session_coaches sc WHERE sc.academy_id = sessions.academy_id
                 AND sc.session_id = sessions.id AND sc.coach_id = ?)`,
      [coachId],
    )
  }
  return query.castTo<SessionOnBoardRow[]>()
}

export async function isCoachOfSession(
  trx: AcademyTrx,
  { sessionId, accountId }: { sessionId: string; accountId: string },
): Promise<boolean> {
  const { rows } = await trx.raw<{ rows: unknown[] }>(
    `SELECT 1 FROM session_coaches sc
       JOIN coaches c ON c.academy_id = sc.academy_id AND c.id = sc.coach_id
     WHERE sc.session_id = ? AND c.account_id = ?`,
    [sessionId, accountId],
  )
  return rows.length > 0
}

export async function isCoachOfClinic(
  trx: AcademyTrx,
  { clinicId, accountId }: { clinicId: string; accountId: string },
): Promise<boolean> {
  const { rows } = await trx.raw<{ rows: unknown[] }>(
    `SELECT 1 FROM clinic_coaches cc
       JOIN coaches c ON c.academy_id = cc.academy_id AND c.id = cc.coach_id
     WHERE cc.clinic_id = ? AND c.account_id = ?`,
    [clinicId, accountId],
  )
  return rows.length > 0
}

export async function listTitles(trx: AcademyTrx): Promise<Map<string, string>> {
  const rows = await Clinic.query(trx).select('id', 'title')
  return new Map(rows.map(({ id, title }) => [id, title]))
}
