import type { Answer, Sent } from '@marram/contract'
import type { Format } from '../academies/format'
import type { ClinicPage } from '../clinics/queries'
import type { DependantDraft } from '../golfers/dependant-fields'
import { toDependant } from '../golfers/dependant-fields'
import type { Pick } from '../ui/picks'

type Clinic = ClinicPage['clinic']
type OwnGolfer = Answer<'golfers.mine'>['golfers'][number]

/** What it costs, before tax that is added on top. */
export function amountOf(clinic: Clinic, what: string): number {
  if (clinic.payMode === 'free') return 0
  return (what === 'session' ? clinic.dropInPriceMinor : clinic.runPriceMinor) ?? 0
}

export function whatPicks(
  clinic: Clinic,
  ahead: readonly Clinic['sessions'][number][],
  format: Format,
): Pick[] {
  const [first] = ahead
  const isLate = ahead.length < clinic.sessions.length
  const picks: Pick[] = []
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

/** Why a golfer of the family cannot take this, where that is known before asking. */
export function refusalFor(golfer: OwnGolfer | null, clinic: Clinic): { refusal?: string } {
  const { ageMin, ageMax } = clinic
  const age = golfer?.ageYears ?? (golfer?.isMe === false ? null : 18)
  if (age === null || (ageMin === null && ageMax === null)) return {}
  const isAdultWithoutDate = golfer?.bornOn == null && (ageMin ?? 0) >= 18
  if (ageMin !== null && age < ageMin && !isAdultWithoutDate) {
    return { refusal: `This clinic is for ages ${ageMin} and up.` }
  }
  return ageMax !== null && age > ageMax
    ? { refusal: `This clinic is for ages up to ${ageMax}.` }
    : {}
}

/** Who it is most likely for: the person where they fit, else somebody of the family who does. */
export function whoFits(golfers: readonly OwnGolfer[], clinic: Clinic): string {
  const me = golfers.find(({ isMe }) => isMe) ?? null
  if (!refusalFor(me, clinic).refusal) return 'me'
  const other = golfers.find((golfer) => !golfer.isMe && !refusalFor(golfer, clinic).refusal)
  return other?.id ?? 'new'
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
