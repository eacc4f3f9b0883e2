export * from './routes'
export * from './schemas'
export { academySettings, academyView, refundTier } from './academies'
export { membershipView, sessionView } from './accounts'
export {
  PAY_MODES,
  SALE_MODES,
  academyFace,
  areaUse,
  clinicFields,
  clinicView,
  pageClinic,
  pageClinicDetail,
  previewDate,
  sessionBrief,
} from './clinics'
export { coachingSettings } from './coaching'
export { comparisonView } from './comparison'
export { enrolmentView, giveUpQuote, placeView, waitlistView } from './enrolments'
export { isSlug } from './fields'
export { dependantFields, golferListItem, golferView, ownGolferView } from './golfers'
export { LEDGER_ACCOUNTS, figure } from './ledger'
export { MARKS, registerRow, registerView } from './register'
export {
  BALL_CURVES,
  BALL_HEIGHTS,
  BALL_STARTS,
  CONTACTS,
  METHODS,
  swingView,
  targetView,
} from './swings'
export { AREA_KINDS, areaView, coachView, venueView } from './venues'
