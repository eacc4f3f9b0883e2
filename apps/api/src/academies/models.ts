import type { Role } from '@marram/contract'
import { AcademyModel } from '../platform/tenancy/academy-model'

export interface RefundTier {
  noticeHours: number
  refundBasisPoints: number
}

export class Academy extends AcademyModel {
  static override tableName = 'academies'
  static override idColumn = 'academyId'
  static override get jsonAttributes() {
    return ['refundTiers']
  }

  slug!: string
  name!: string
  place!: string
  lead!: string
  address!: string
  zone!: string
  locale!: string
  currency!: string
  accent!: string
  accentDusk!: string
  taxMode!: 'included' | 'added'
  taxName!: string
  taxBasisPoints!: number
  refundTiers!: RefundTier[]
  waiver!: string
  safeguarding!: string
  holdMinutes!: number
  offerHours!: number
  duskKind!: 'sunset' | 'civil'
  owedDefault!: 'credit' | 'money'
  canPayAtDesk!: boolean
  publishedAt!: Date | null
  paymentsAccount!: string | null
  paymentsState!: 'none' | 'started' | 'ready'
  createdAt!: Date
}

export class MembershipRow extends AcademyModel {
  static override tableName = 'memberships'
  static override idColumn = ['academyId', 'accountId', 'role']

  accountId!: string
  role!: Role
  createdAt!: Date
}

export class Invitation extends AcademyModel {
  static override tableName = 'invitations'
  static override idColumn = ['academyId', 'id']

  id!: string
  email!: string
  role!: Exclude<Role, 'golfer'>
  coachId!: string | null
  tokenHash!: Buffer
  invitedBy!: string | null
  expiresAt!: Date
  acceptedAt!: Date | null
  createdAt!: Date
}
