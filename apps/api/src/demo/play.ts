import { chooseForOwedPlace } from '../checkout/called-off'
import { giveUp, quoteGivingUp } from '../checkout/giving-up'
import { payAtDesk, startCheckout, takeCash } from '../checkout/orders'
import { hearProvider } from '../checkout/webhooks'
import { callOffSession } from '../clinics/sessions'
import { findEnrolment, holdPlaces } from '../enrolments/enrolments'
import { joinWaitlist } from '../enrolments/waitlist'
import { ensureOwnGolfer } from '../golfers/golfers'
import { Problem } from '../platform/errors'
import type { Services } from '../platform/services'
import { inAcademy } from '../platform/tenancy/transaction'
import { closeRegister, markPlace, readRegister } from '../register/register'
import type { BuiltAcademy, BuiltClinic } from './academy'
import type { DemoProvider } from './demo-provider'
import type { DemoGolfer } from './golfers'
import { findCheckout, listUndecided } from './queries'
import type { Random } from './random'
import type { Season } from './season'

export interface Stage {
  services: Services
  provider: DemoProvider
  academy: BuiltAcademy
  golfers: DemoGolfer[]
  random: Random
  season: Season
  /** When the season behind us began, and the moment that the demo is loaded. */
  began: Date
  today: Date
}

const HOUR_MS = 3_600_000
const DAY_MS = 24 * HOUR_MS

interface Seat {
  golfer: DemoGolfer
  child: { golferId: string } | null
}

/** Plans all that happens around one clinic: sales, registers, weather, second thoughts. */
export function planClinic(stage: Stage, clinic: BuiltClinic): void {
  const { script, view } = clinic
  if (script.isDraft) return
  const seats = castOf(stage, clinic)
  if (view.saleMode === 'drop-in') {
    for (const session of view.sessions) {
      const some = stage.random.shuffle(seats).slice(0, wantedSeats(stage, clinic))
      planSales(stage, { clinic, seats: some, sessionId: session.id, startsAt: session.startsAt })
    }
  } else {
    const [first] = view.sessions
    if (first) planSales(stage, { clinic, seats, startsAt: first.startsAt })
  }
  for (const session of view.sessions) {
    const off = script.calledOff?.find(({ number }) => number === session.number)
    if (off)
      planWeather(stage, { sessionId: session.id, startsAt: session.startsAt, reason: off.reason })
    else planRegister(stage, { clinic, session })
  }
}

function wantedSeats({ random }: Stage, { script }: BuiltClinic): number {
  const share = Math.min(1, script.filled * (0.8 + random.next() * 0.4))
  return Math.round(script.capacity * share)
}

/** Who comes: children for clinics with ages, grown-ups whose handicap fits for the others. */
function castOf({ golfers, random }: Stage, { script, view }: BuiltClinic): Seat[] {
  const { ages, handicaps } = script
  const seats: Seat[] = ages
    ? golfers.flatMap((golfer) =>
        golfer.children
          .filter(({ ageYears }) => ageYears >= ages[0] + 1 && ageYears <= ages[1] - 1)
          .map((child) => ({ golfer, child })),
      )
    : golfers
        .filter(({ handicap }) => {
          if (!handicaps) return true
          const [from, to] = handicaps
          return handicap !== null && handicap >= (from ?? -10) && handicap <= (to ?? 54)
        })
        .map((golfer) => ({ golfer, child: null }))
  const isDropIn = view.saleMode === 'drop-in'
  const wanted = isDropIn ? script.capacity * 3 : Math.round(script.capacity * script.filled)
  return random.shuffle(seats).slice(0, wanted + (script.waiting ?? 0))
}

function planSales(
  stage: Stage,
  given: { clinic: BuiltClinic; seats: Seat[]; sessionId?: string; startsAt: string },
): void {
  const { random, season, began, today } = stage
  const { clinic, seats, sessionId } = given
  const first = new Date(given.startsAt).getTime()
  const earliest = Math.max(began.getTime() + HOUR_MS, first - 21 * DAY_MS)
  // What lies far ahead was bought in the last weeks, and nothing is bought after today.
  const from = Math.min(earliest, today.getTime() - 14 * DAY_MS)
  const until = Math.min(first - 6 * HOUR_MS, today.getTime() - HOUR_MS)
  for (const [index, seat] of seats.entries()) {
    const isGivenUp = index < (clinic.script.givenUp ?? 0)
    const at = new Date(from + random.next() * Math.max(0, until - from))
    season.plan(at, () => buy(stage, { clinic, seat, sessionId, isGivenUp }))
  }
}

async function buy(
  stage: Stage,
  given: { clinic: BuiltClinic; seat: Seat; sessionId: string | undefined; isGivenUp: boolean },
): Promise<void> {
  const { services, provider, academy, random } = stage
  const { clinic, seat, sessionId, isGivenUp } = given
  const { academyId } = academy
  const { person, handicap } = seat.golfer
  const what = { clinicId: clinic.view.id, ...(sessionId ? { sessionId } : {}) }
  try {
    const wanted = {
      ...what,
      for: seat.child
        ? { kind: 'golfer' as const, golferId: seat.child.golferId }
        : { kind: 'me' as const, handicap },
      hasAcceptedWaiver: true as const,
    }
    const enrolmentId = await holdPlaces(services, { academyId, person, wanted }, (_, id) =>
      Promise.resolve(id),
    )
    const own = { academyId, enrolmentId, accountId: person.id }
    if (clinic.script.payMode === 'free') return
    if (clinic.script.payMode === 'desk') {
      await payAtDesk(services, provider, own)
      if (random.chance(0.7)) await payCash(stage, { enrolmentId })
      return
    }
    const url = await startCheckout(services, provider, own)
    await provider.payCheckout(url, services.clock.now())
    await tellPaid(stage, enrolmentId)
    if (isGivenUp) planSecondThoughts(stage, own)
  } catch (error) {
    if (!(error instanceof Problem)) throw error
    if (error.code === 'session-full') await wait(stage, { seat, what })
    // Whoever has a place already, or came too late, is left as they are.
    else if (!['already-has-place', 'not-on-sale', 'golfer-does-not-fit'].includes(error.code)) {
      throw error
    }
  }
}

async function payCash(stage: Stage, { enrolmentId }: { enrolmentId: string }): Promise<void> {
  const { services, academy } = stage
  const { academyId, ownerId } = academy
  const enrolment = await inAcademy(services.db, academyId, (trx) =>
    findEnrolment(trx, enrolmentId),
  )
  const amountMinor = (enrolment?.netMinor ?? 0) + (enrolment?.taxMinor ?? 0)
  await takeCash(services, { academyId, enrolmentId, amountMinor, takenBy: ownerId })
}

async function tellPaid(stage: Stage, enrolmentId: string): Promise<void> {
  const { services, provider, academy } = stage
  const { academyId } = academy
  const found = await inAcademy(services.db, academyId, (trx) => findCheckout(trx, enrolmentId))
  if (!found) throw new Error('a checkout that was paid has an order')
  await hearProvider(services, provider, {
    eventId: enrolmentId,
    account: found.account,
    type: 'checkout.session.completed',
    objectId: found.checkoutId,
  })
}

async function wait(
  stage: Stage,
  { seat, what }: { seat: Seat; what: { clinicId: string; sessionId?: string } },
): Promise<void> {
  const { services, academy } = stage
  const { academyId } = academy
  const { person } = seat.golfer
  const golferId =
    seat.child?.golferId ??
    (await inAcademy(services.db, academyId, (trx) => ensureOwnGolfer(services, trx, { person })))
      .id
  await joinWaitlist(services, { academyId, person, wanted: { ...what, golferId } })
}

function planSecondThoughts(
  { services, academy, season }: Stage,
  own: { academyId: string; enrolmentId: string; accountId: string },
): void {
  const { academyId } = academy
  season.plan(new Date(services.clock.now().getTime() + 2 * DAY_MS), async () => {
    const { enrolmentId, accountId } = own
    const given = { academyId, enrolmentId, by: { kind: 'golfer', accountId } } as const
    const { refundMinor } = await quoteGivingUp(services, given)
    await giveUp(services, { ...given, refundMinor })
  })
}

function planWeather(
  stage: Stage,
  given: { sessionId: string; startsAt: string; reason: string },
): void {
  const { services, academy, season, random } = stage
  const { academyId, ownerId } = academy
  const { sessionId, reason } = given
  const at = new Date(new Date(given.startsAt).getTime() - 3 * HOUR_MS)
  season.plan(at, async () => {
    const reach = { academyId, accountId: ownerId, scope: 'all' } as const
    await callOffSession(services, { reach, sessionId, reason })
  })
  season.plan(new Date(at.getTime() + 26 * HOUR_MS), async () => {
    const owed = await inAcademy(services.db, academyId, (trx) => listUndecided(trx, sessionId))
    for (const { placeId, accountId } of owed) {
      if (random.chance(0.25)) continue
      const choice = random.chance(0.5) ? 'credit' : 'money'
      await chooseForOwedPlace(services, { academyId, accountId, placeId, choice })
    }
  })
}

function planRegister(
  stage: Stage,
  { clinic, session }: { clinic: BuiltClinic; session: BuiltClinic['view']['sessions'][number] },
): void {
  const { services, academy, season, random } = stage
  const { academyId, ownerId, coachAccounts } = academy
  const accountId = coachAccounts.get(clinic.script.coach) ?? ownerId
  const reach = { academyId, accountId, scope: 'own' } as const
  const sessionId = session.id
  season.plan(new Date(session.endsAt), async () => {
    const register = await readRegister(services, { reach, sessionId })
    if (register.rows.length === 0) return
    for (const { placeId } of register.rows) {
      const luck = random.next()
      const mark =
        luck < 0.82 ? 'present' : luck < 0.9 ? 'late' : luck < 0.97 ? 'absent' : 'excused'
      await markPlace(services, { reach, sessionId, placeId, press: { mark } })
    }
    await closeRegister(services, { reach, sessionId, revision: register.revision })
  })
}
