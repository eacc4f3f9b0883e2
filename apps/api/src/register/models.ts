import type { MARKS } from '@marram/contract'
import { AcademyModel } from '../platform/tenancy/academy-model'

export type Mark = (typeof MARKS)[number]

export class MarkRow extends AcademyModel {
  static override tableName = 'marks'
  static override idColumn = ['academyId', 'placeId']

  placeId!: string
  sessionId!: string
  mark!: Mark
  markedBy!: string
  markedAt!: Date
  pressedAt!: Date | null
}

export class MarkChange extends AcademyModel {
  static override tableName = 'mark_history'
  static override idColumn = ['academyId', 'id']

  id!: string
  placeId!: string
  mark!: Mark | null
  markedBy!: string
  markedAt!: Date
  pressedAt!: Date | null
}
