import { AcademyModel } from '../platform/tenancy/academy-model'

export class Order extends AcademyModel {
  static override tableName = 'orders'
  static override idColumn = ['academyId', 'id']

  id!: string
  enrolmentId!: string
  accountId!: string | null
  state!: 'open' | 'paid' | 'void'
  method!: 'card' | 'desk'
  currency!: string
  netMinor!: number
  taxMinor!: number
  checkoutId!: string | null
  checkoutUrl!: string | null
  attempt!: number
  lastRefusal!: string | null
  createdAt!: Date
  paidAt!: Date | null
}

export class Payment extends AcademyModel {
  static override tableName = 'payments'
  static override idColumn = ['academyId', 'id']

  id!: string
  orderId!: string
  method!: 'card' | 'cash' | 'transfer'
  amountMinor!: number
  currency!: string
  providerPayment!: string | null
  providerFeeMinor!: number
  platformFeeMinor!: number
  takenBy!: string | null
  takenAt!: Date
}

export class Refund extends AcademyModel {
  static override tableName = 'refunds'
  static override idColumn = ['academyId', 'id']

  id!: string
  orderId!: string
  paymentId!: string | null
  reason!: 'given-up' | 'called-off' | 'late-payment'
  sourceId!: string
  method!: 'card' | 'cash' | 'credit'
  amountMinor!: number
  currency!: string
  state!: 'asked' | 'done' | 'failed'
  providerRefund!: string | null
  createdAt!: Date
  /** When the provider was last asked for it, or after it. */
  askedAt!: Date
  doneAt!: Date | null
}

export class OwedPlace extends AcademyModel {
  static override tableName = 'owed_places'
  static override idColumn = ['academyId', 'placeId']

  placeId!: string
  amountMinor!: number
  choice!: 'credit' | 'money' | null
  chosenBy!: 'golfer' | 'default' | null
  chooseBy!: Date
  settledAt!: Date | null
}

export class CreditChange extends AcademyModel {
  static override tableName = 'credit_changes'
  static override idColumn = ['academyId', 'id']

  id!: string
  golferId!: string
  amountMinor!: number
  currency!: string
  sourceType!: string
  sourceId!: string
  createdAt!: Date
}
