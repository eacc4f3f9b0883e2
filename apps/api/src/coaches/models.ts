import { AcademyModel } from '../platform/tenancy/academy-model'

export class Coach extends AcademyModel {
  static override tableName = 'coaches'
  static override idColumn = ['academyId', 'id']

  id!: string
  accountId!: string | null
  name!: string
  initials!: string
  about!: string
  createdAt!: Date
}
