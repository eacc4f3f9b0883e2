import type { Knex } from 'knex'
import { Model, type RelationMappings } from 'objection'
import { AcademyModel } from '../../apps/api/src/platform/tenancy/academy-model'
import { inAcademy } from '../../apps/api/src/platform/tenancy/transaction'

/**
 * Two academies whose rows have the same ids, and models that join by id alone: whatever forgets
 * the academy finds its twin's row as well.
 */
export const OURS = '01900000-0000-7000-8000-00000000000a'
export const THEIRS = '01900000-0000-7000-8000-00000000000b'
export const VENUE = '01900000-0000-7000-8000-000000000001'
export const AREA = '01900000-0000-7000-8000-000000000002'

const AT = new Date('2031-03-03T09:00:00Z')

export class TwinArea extends AcademyModel {
  static override tableName = 'areas'
  static override idColumn = ['academyId', 'id']

  static override get relationMappings(): RelationMappings {
    const join = { from: 'areas.venueId', to: 'venues.id' }
    return { venue: { relation: Model.BelongsToOneRelation, modelClass: TwinVenue, join } }
  }

  id!: string
  venueId!: string
  name!: string
  units!: number
  venue?: TwinVenue
}

export class TwinVenue extends AcademyModel {
  static override tableName = 'venues'
  static override idColumn = ['academyId', 'id']

  static override get relationMappings(): RelationMappings {
    const join = { from: 'venues.id', to: 'areas.venueId' }
    return { areas: { relation: Model.HasManyRelation, modelClass: TwinArea, join } }
  }

  id!: string
  name!: string
  areas?: TwinArea[]
}

export const venueRow = (name: string) => ({
  id: VENUE,
  name,
  latitudeDeg: 53,
  longitudeDeg: -6,
  zone: 'Europe/Dublin',
  createdAt: AT,
})

export const areaRow = (name: string) => ({
  id: AREA,
  venueId: VENUE,
  name,
  kind: 'range',
  units: 12,
  hasLamps: true,
  isCovered: true,
  createdAt: AT,
})

/** Writes both academies, as a role that sees every row. */
export async function makeTwins(superuser: Knex): Promise<void> {
  for (const [academyId, slug] of [
    [OURS, 'ours'],
    [THEIRS, 'theirs'],
  ] as const) {
    await superuser('academies').insert(academyRow(academyId, slug))
    await superuser('venues').insert({ academyId, ...venueRow(`Venue of ${slug}`) })
    await superuser('areas').insert({ academyId, ...areaRow(`Area of ${slug}`) })
  }
}

/** Runs `work` in our academy. */
export const inOurs = <T>(
  db: Knex,
  work: Parameters<typeof inAcademy<T>>[2],
): ReturnType<typeof inAcademy<T>> => inAcademy(db, OURS, work)

function academyRow(academyId: string, slug: string) {
  return {
    academyId,
    slug,
    name: slug,
    place: 'Skerrow',
    zone: 'Europe/Dublin',
    locale: 'en-IE',
    currency: 'EUR',
    accent: '#26563d',
    accentDusk: '#9ecba8',
    taxMode: 'included',
    taxName: 'VAT',
    taxBasisPoints: 900,
    refundTiers: '[]',
    waiver: '',
    safeguarding: '',
    holdMinutes: 15,
    offerHours: 12,
    duskKind: 'sunset',
    owedDefault: 'credit',
    canPayAtDesk: true,
    createdAt: AT,
  }
}
