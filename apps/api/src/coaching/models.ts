import type { BALL_CURVES, BALL_HEIGHTS, BALL_STARTS, CONTACTS } from '@marram/contract'
import type { ClubName, Method } from '@marram/swing'
import { AcademyModel } from '../platform/tenancy/academy-model'

export class Swing extends AcademyModel {
  static override tableName = 'swings'
  static override idColumn = ['academyId', 'id']

  id!: string
  golferId!: string
  sessionId!: string | null
  recordedBy!: string | null
  recordedAt!: Date
  club!: ClubName
  method!: Method
  errorDeg!: number
  addressFlexionDeg!: number
  addressUlnarDeg!: number
  topFlexionDeg!: number
  topUlnarDeg!: number
  impactFlexionDeg!: number
  impactUlnarDeg!: number
  ballStart!: (typeof BALL_STARTS)[number] | null
  ballCurve!: (typeof BALL_CURVES)[number] | null
  ballHeight!: (typeof BALL_HEIGHTS)[number] | null
  contact!: (typeof CONTACTS)[number] | null
  distanceMetres!: number | null
  faceDeg!: number | null
  pathDeg!: number | null
  attackDeg!: number | null
  speedMps!: number | null
  note!: string
  removedAt!: Date | null
  removedBy!: string | null
}

export class SwingTarget extends AcademyModel {
  static override tableName = 'swing_targets'
  static override idColumn = ['academyId', 'id']

  id!: string
  golferId!: string
  /** Null for every club that has none of its own. */
  club!: ClubName | null
  addressFlexionDeg!: number | null
  addressUlnarDeg!: number | null
  topFlexionDeg!: number | null
  topUlnarDeg!: number | null
  impactFlexionDeg!: number | null
  impactUlnarDeg!: number | null
  setBy!: string | null
  setAt!: Date
}

export class CoachingSettings extends AcademyModel {
  static override tableName = 'coaching_settings'
  static override idColumn = 'academyId'

  toleranceDeg!: number
  sensorErrorDeg!: number
  cameraErrorDeg!: number
  goniometerErrorDeg!: number
  eyeErrorDeg!: number
  extensionOutDeg!: number
  radialBackDeg!: number
  changedBy!: string | null
  changedAt!: Date
}
