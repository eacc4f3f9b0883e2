import type { Sent } from '@marram/contract'
import type { Format } from '../academies/format'
import { localDayOf } from '../academies/local-day'
import type { ClinicPage } from '../clinics/queries'
import type { DependantDraft } from '../golfers/dependant-fields'
import { ageOn } from '../golfers/age'
import { toDependant } from '../golfers/dependant-fields'
import type { OwnGolfer } from '../golfers/queries'
import type { Pick as Choice } from '../ui/picks'

type Clinic = ClinicPage['clinic']

/** What it costs, before tax that is added on top. */
export function amountOf(clinic: Clinic, what: string): number {
  if (clinic.payMode === 'free') return 0
  return (what === 'session' ? clinic.dropInPriceMinor : clinic.runPriceMinor) ?? 0
}

export function whatPicks(
  clinic: Clinic,
  ahead: readonly Clinic['sessions'][number][],
  format: Format,
): Choice[] {
  const [first] = ahead
  const isLate = ahead.length < clinic.sessions.length
  const picks: Choice[] = []
  if (clinic.saleMode !== 'drop-in') {
    picks.push({
      value: 'run',
      title: isLate ? 'The sessions left' : 'The whole run',
      detail: first
        ? `${ahead.length} ${ahead.length === 1 ? 'session' : 'sessions'} from ${format.day(first.startsAt, 'long')}`
        : undefined,
      ...priced(clinic.runPriceMinor, clinic, format),
    })
  }
  if (clinic.saleMode !== 'run') {
    picks.push({
      value: 'session',
      title: 'One session',
      detail: 'You choose the date',
      ...priced(clinic.dropInPriceMinor, clinic, format),
    })
  }
  return picks
}

function priced(amountMinor: number | null, { payMode }: Clinic, format: Format) {
  return payMode === 'free' || amountMinor === null ? {} : { amount: format.money(amountMinor) }
}

type AgeRange = Pick<Clinic, 'ageMin' | 'ageMax' | 'zone'>
type AgedGolfer = Pick<OwnGolfer, 'isMe' | 'bornOn'>

const ADULT_AGE_YEARS = 18

/**
 * Why a golfer of the family cannot take this, where that is known before asking. Ages are those of
 * the day of the first session taken, as the API counts them: who turns seven by then may come.
 */
export function refusalFor(
  golfer: AgedGolfer | null,
  { ageMin, ageMax, zone }: AgeRange,
  firstStartsAt: string,
): { refusal?: string } {
  if (ageMin === null && ageMax === null) return {}
  const bornOn = golfer?.bornOn ?? null
  const assumed = golfer?.isMe === false ? null : ADULT_AGE_YEARS
  const age = bornOn === null ? assumed : ageOn(bornOn, localDayOf(firstStartsAt, zone))
  if (age === null) return {}
  const isAdultWithoutDate = bornOn === null && (ageMin ?? 0) >= ADULT_AGE_YEARS
  if (ageMin !== null && age < ageMin && !isAdultWithoutDate) {
    return { refusal: `This clinic is for ages ${ageMin} and up.` }
  }
  return ageMax !== null && age > ageMax
    ? { refusal: `This clinic is for ages up to ${ageMax}.` }
    : {}
}

/** Who it is most likely for: the person where they fit, else somebody of the family who does. */
export function whoFits(
  golfers: readonly OwnGolfer[],
  clinic: AgeRange,
  firstStartsAt: string,
): string {
  const fits = (golfer: OwnGolfer | null) => !refusalFor(golfer, clinic, firstStartsAt).refusal
  if (fits(golfers.find(({ isMe }) => isMe) ?? null)) return 'me'
  return golfers.find((golfer) => !golfer.isMe && fits(golfer))?.id ?? 'new'
}

/** Everybody it can be for; who does not fit is shown, with the reason. */
export function whoPicks(given: {
  golfers: readonly OwnGolfer[]
  clinic: AgeRange
  firstStartsAt: string
  myName: string | undefined
}): Choice[] {
  const { golfers, clinic, firstStartsAt, myName } = given
  const me = golfers.find(({ isMe }) => isMe) ?? null
  return [
    { value: 'me', title: 'Me', detail: myName, ...refusalFor(me, clinic, firstStartsAt) },
    ...golfers
      .filter(({ isMe }) => !isMe)
      .map((golfer) => ({
        value: golfer.id,
        title: `${golfer.name}${golfer.ageYears === null ? '' : `, ${golfer.ageYears}`}`,
        ...refusalFor(golfer, clinic, firstStartsAt),
      })),
    {
      value: 'new',
      title: 'Add someone you look after',
      detail: 'Name, date of birth, who to call',
    },
  ]
}

/** Each date ahead with the places it has left. */
export function datePicks(ahead: readonly Clinic['sessions'][number][], format: Format): Choice[] {
  return ahead.map((session) => ({
    value: session.id,
    title: format.session(session),
    detail:
      session.taken >= session.capacity
        ? 'Full: you can join the waitlist'
        : `${session.capacity - session.taken} of ${session.capacity} places left`,
  }))
}

/** The golfer part of a hold. */
export function whoIsFor(given: {
  who: string
  handicap: string
  dependant: DependantDraft
}): Sent<'enrolments.hold', 'body'>['for'] {
  const { who, handicap, dependant } = given
  if (who === 'new') return { kind: 'new', dependant: toDependant(dependant) }
  if (who !== 'me') return { kind: 'golfer', golferId: who }
  return handicap.trim() === ''
    ? { kind: 'me' }
    : { kind: 'me', handicap: Number(handicap.replace(',', '.')) }
}
