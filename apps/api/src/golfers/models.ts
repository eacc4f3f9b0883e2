import { AcademyModel } from '../platform/tenancy/academy-model'

export class Golfer extends AcademyModel {
  static override tableName = 'golfers'
  static override idColumn = ['academyId', 'id']

  id!: string
  accountId!: string | null
  guardianAccountId!: string | null
  name!: string
  email!: string | null
  phone!: string | null
  bornOn!: string | null
  handicap!: number | null
  handicapOn!: string | null
  hand!: 'right' | 'left'
  emergencyName!: string | null
  emergencyPhone!: string | null
  notes!: string
  createdAt!: Date
}

export class Consent extends AcademyModel {
  static override tableName = 'consents'
  static override idColumn = ['academyId', 'id']

  id!: string
  golferId!: string
  kind!: 'takes-part' | 'waiver' | 'photo'
  wording!: string
  givenBy!: string
  givenAt!: Date
  withdrawnAt!: Date | null
}

export class MinorLookUp extends AcademyModel {
  static override tableName = 'minor_look_ups'
  static override idColumn = ['academyId', 'id']

  id!: string
  golferId!: string
  accountId!: string
  lookedAt!: Date
}
