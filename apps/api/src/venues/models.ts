import type { AREA_KINDS } from '@marram/contract'
import { AcademyModel } from '../platform/tenancy/academy-model'

export class Venue extends AcademyModel {
  static override tableName = 'venues'
  static override idColumn = ['academyId', 'id']

  id!: string
  name!: string
  address!: string
  gettingHere!: string
  latitudeDeg!: number
  longitudeDeg!: number
  zone!: string
  createdAt!: Date
}

export class Area extends AcademyModel {
  static override tableName = 'areas'
  static override idColumn = ['academyId', 'id']

  id!: string
  venueId!: string
  name!: string
  kind!: (typeof AREA_KINDS)[number]
  units!: number
  hasLamps!: boolean
  isCovered!: boolean
  createdAt!: Date
}
