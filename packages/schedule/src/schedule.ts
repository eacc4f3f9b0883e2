export {
  findClashes,
  findClashesBetween,
  type AreaUnits,
  type Clash,
  type TakenTime,
} from './clash'
export {
  civilDuskAt,
  darkMinutesOf,
  duskAt,
  lightOf,
  sunriseAt,
  sunsetAt,
  sunTimes,
  type DuskRule,
  type PlaceAndDay,
  type SessionLight,
  type SunTimes,
} from './daylight'
export { describeRecurrence } from './describe-recurrence'
export {
  toInstant,
  toLocal,
  transitionsBetween,
  type LocalDate,
  type LocalDateTime,
  type ZoneTransition,
} from './local-time'
export { parseRecurrence, type ParsedRecurrence, type RecurrenceRefusal } from './parse-recurrence'
export {
  expandLocal,
  formatRecurrence,
  MAX_OCCURRENCES,
  WEEKDAYS,
  type ByDay,
  type LocalPattern,
  type Recurrence,
  type RecurrenceEnd,
  type Weekday,
} from './recurrence'
export {
  datesOfRun,
  expandInstants,
  planRun,
  type PlannedRun,
  type RunDate,
  type RunPattern,
} from './run-dates'
