import { AcademyModel } from '../platform/tenancy/academy-model'

export type EndedBecause = 'lapsed' | 'given-up' | 'called-off' | 'let-go'

export class Enrolment extends AcademyModel {
  static override tableName = 'enrolments'
  static override idColumn = ['academyId', 'id']

  id!: string
  clinicId!: string
  golferId!: string
  takenBy!: string | null
  kind!: 'run' | 'session'
  state!: 'held' | 'confirmed' | 'cancelled'
  endedBecause!: EndedBecause | null
  isOffer!: boolean
  heldUntil!: Date | null
  currency!: string
  netMinor!: number
  taxMinor!: number
  payMode!: 'card' | 'desk' | 'free'
  createdAt!: Date
  endedAt!: Date | null
}

export class Place extends AcademyModel {
  static override tableName = 'places'
  static override idColumn = ['academyId', 'id']

  id!: string
  enrolmentId!: string
  sessionId!: string
  golferId!: string
  state!: 'held' | 'confirmed' | 'cancelled'
  endedBecause!: EndedBecause | null
  netMinor!: number
  taxMinor!: number
}

export class WaitlistEntry extends AcademyModel {
  static override tableName = 'waitlist_entries'
  static override idColumn = ['academyId', 'id']

  id!: string
  clinicId!: string
  sessionId!: string | null
  golferId!: string
  accountId!: string
  state!: 'waiting' | 'offered' | 'taken' | 'passed' | 'left'
  enrolmentId!: string | null
  joinedAt!: Date
}
