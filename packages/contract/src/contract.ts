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
export { enrolmentView, giveUpQuote, placeView, waitlistView } from './enrolments'
export { isSlug } from './fields'
export { dependantFields, golferListItem, golferView, ownGolferView } from './golfers'
export { LEDGER_ACCOUNTS, figure } from './ledger'
export { MARKS, registerRow, registerView } from './register'
export { AREA_KINDS, areaView, coachView, venueView } from './venues'
