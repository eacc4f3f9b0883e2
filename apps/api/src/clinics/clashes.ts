import type { Answer } from '@marram/contract'
import { findClashesBetween, type TakenTime } from '@marram/schedule'
import { formatTime } from '@marram/schedule/format'
import { findCoaches } from '../coaches/coaches'
import { refusalOf } from '../platform/db/refusal'
import { Problem } from '../platform/errors'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import { findAreas } from '../venues/venues'
import { listBusy, type AreaUse } from './queries'

type ClashView = Answer<'clinics.preview'>['dates'][number]['clashes'][number]

export interface PlannedTime {
  key: string
  startsAt: Date
  endsAt: Date
}

/** What is in the way of planned times, in words, by their key. */
export async function findClashes(
  trx: AcademyTrx,
  wanted: {
    times: readonly PlannedTime[]
    coachIds: readonly string[]
    areas: readonly AreaUse[]
    zone: string
    locale: string
    exceptClinicId?: string
    exceptSessionId?: string
  },
): Promise<Map<string, ClashView[]>> {
  const { times, coachIds, areas } = wanted
  const found = new Map<string, ClashView[]>()
  if (times.length === 0) return found
  const busy = await listBusy(trx, {
    from: new Date(Math.min(...times.map(({ startsAt }) => startsAt.getTime()))),
    to: new Date(Math.max(...times.map(({ endsAt }) => endsAt.getTime()))),
    coachIds,
    areaIds: areas.map(({ areaId }) => areaId),
    exceptClinicId: wanted.exceptClinicId ?? null,
    exceptSessionId: wanted.exceptSessionId ?? null,
  })
  if (busy.length === 0) return found
  const coaches = new Map((await findCoaches(trx, coachIds)).map(({ id, name }) => [id, name]))
  const areaNames = new Map(
    (
      await findAreas(
        trx,
        areas.map(({ areaId }) => areaId),
      )
    ).map(({ id, name }) => [id, name]),
  )
  const planned = times.map(({ key, startsAt, endsAt }): TakenTime => {
    return { id: key, startsAt, endsAt, isCalledOff: false, coachIds, areas }
  })
  const existing = busy.map(({ sessionId, ...row }): TakenTime => {
    return { id: sessionId, isCalledOff: false, ...row }
  })
  const busyById = new Map(busy.map((row) => [row.sessionId, row]))
  for (const clash of findClashesBetween({ planned, existing })) {
    const other = busyById.get(clash.firstId) ?? busyById.get(clash.secondId)
    if (!other) continue
    const key = busyById.has(clash.firstId) ? clash.secondId : clash.firstId
    const until = formatTime({ at: other.endsAt, zone: wanted.zone, locale: wanted.locale })
    const sentence =
      clash.kind === 'coach'
        ? `${coaches.get(clash.coachId)} has ${other.clinicTitle} until ${until}.`
        : `${areaNames.get(clash.areaId)} ${unitsInWords(clash)} has ${other.clinicTitle} until ${until}.`
    found.set(key, [...(found.get(key) ?? []), { kind: clash.kind, sentence }])
  }
  return found
}

function unitsInWords({ fromUnit, toUnit }: AreaUse): string {
  return fromUnit === toUnit ? `(${fromUnit})` : `(${fromUnit} to ${toUnit})`
}

const EXCLUSION_VIOLATION = '23P01'

/** Turns the database's refusal of a clash into words; other errors pass. */
export async function sayClashes<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work()
  } catch (error) {
    const { code, constraint } = refusalOf(error)
    if (code !== EXCLUSION_VIOLATION) throw error
    throw new Problem(
      'clash',
      constraint === 'session_coaches_no_clash'
        ? 'A coach is somewhere else at one of these times.'
        : 'Some of these bays are taken at one of these times.',
    )
  }
}
