import type { PAY_MODES, SALE_MODES } from '@marram/contract'
import { AcademyModel } from '../platform/tenancy/academy-model'

export class Clinic extends AcademyModel {
  static override tableName = 'clinics'
  static override idColumn = ['academyId', 'id']

  id!: string
  slug!: string
  title!: string
  summary!: string
  about!: string
  bring!: string
  handicapMin!: number | null
  handicapMax!: number | null
  ageMin!: number | null
  ageMax!: number | null
  capacity!: number
  saleMode!: (typeof SALE_MODES)[number]
  payMode!: (typeof PAY_MODES)[number]
  runPriceMinor!: number | null
  dropInPriceMinor!: number | null
  venueId!: string
  zone!: string
  startsOnLocal!: string
  startsAtLocal!: string
  durationMinutes!: number
  rrule!: string
  skipDates!: string[]
  state!: 'draft' | 'published' | 'withdrawn'
  createdAt!: Date
}

export class ClinicCoach extends AcademyModel {
  static override tableName = 'clinic_coaches'
  static override idColumn = ['academyId', 'clinicId', 'coachId']

  clinicId!: string
  coachId!: string
  position!: number
}

export class ClinicArea extends AcademyModel {
  static override tableName = 'clinic_areas'
  static override idColumn = ['academyId', 'clinicId', 'areaId']

  clinicId!: string
  areaId!: string
  position!: number
  fromUnit!: number
  toUnit!: number
}

export class Session extends AcademyModel {
  static override tableName = 'sessions'
  static override idColumn = ['academyId', 'id']

  id!: string
  clinicId!: string
  number!: number
  heldOn!: string
  startsAt!: Date
  endsAt!: Date
  duskAt!: Date | null
  capacity!: number
  held!: number
  confirmed!: number
  state!: 'planned' | 'called-off'
  calledOffAt!: Date | null
  calledOffReason!: string | null
  registerState!: 'open' | 'closed'
  registerRevision!: number
  registerClosedAt!: Date | null
  registerClosedBy!: string | null
  calendarSequence!: number
}
