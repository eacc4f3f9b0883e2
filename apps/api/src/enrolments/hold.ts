import { refusalOf } from '../platform/db/refusal'
import { Problem } from '../platform/errors'
import { newId } from '../platform/ids'
import type { Services } from '../platform/services'
import { together } from '../platform/tenancy/together'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import type { OnSale } from './on-sale'
import { insertEnrolment, takeSeats } from './queries'
import { isFull } from './rules'

/**
 * Takes places for a golfer: the enrolment and its places first, the seats last before commit, all
 * or nothing. What costs nothing is confirmed at once; the rest is held until `heldUntil`.
 * Resolves to what `meanwhile` makes of the enrolment's id: it asks what does not hang on the seats,
 * and goes out before them. Throws `session-full`, `already-has-place`, and `not-on-sale` when its
 * dates are changed in between.
 */
export async function takePlaces<T>(
  services: Services,
  trx: AcademyTrx,
  given: {
    onSale: OnSale
    golferId: string
    takenBy: string | null
    heldUntil: Date
    isOffer: boolean
    meanwhile: (enrolmentId: string) => Promise<T>
  },
): Promise<T> {
  const { onSale, golferId, takenBy, isOffer } = given
  const { clinic, academy, kind, taken, price } = onSale
  const now = services.clock.now()
  const isFree = price.netMinor + price.taxMinor === 0
  const state = isFree ? 'confirmed' : 'held'
  const id = newId(now)
  const enrolment = {
    id,
    clinicId: clinic.id,
    golferId,
    takenBy,
    kind,
    state,
    isOffer,
    heldUntil: isFree ? null : given.heldUntil,
    currency: academy.currency,
    netMinor: price.netMinor,
    taxMinor: price.taxMinor,
    payMode: isFree ? 'free' : clinic.payMode,
    createdAt: now,
  } as const
  const places = price.places.map((place) => ({ id: newId(now), ...place }))
  const sessionIds = taken.map((session) => session.id)
  const event = { academyId: academy.academyId, enrolmentId: id }
  const [, , answer, seats] = await together(
    sayWhatCame(insertEnrolment(trx, enrolment, places)),
    isFree ? services.outbox.emit(trx, 'enrolment.confirmed', event) : Promise.resolve(),
    given.meanwhile(id),
    takeSeats(trx, { sessionIds, as: state }),
  )
  if (seats.length < sessionIds.length) throw sessionFull()
  return answer
}

/** A first look that spares the writes where the answer is plain already. Throws `session-full`. */
export function refuseFull({ taken }: OnSale): void {
  if (taken.some(isFull)) throw sessionFull()
}

const sessionFull = () =>
  new Problem('session-full', 'The last place has just gone. You can join the waitlist.')

const UNIQUE_VIOLATION = '23505'
const FOREIGN_KEY_VIOLATION = '23503'

async function sayWhatCame<T>(writing: Promise<T>): Promise<T> {
  try {
    return await writing
  } catch (error) {
    const { code, constraint } = refusalOf(error)
    if (code === UNIQUE_VIOLATION && constraint === 'places_one_while_active') {
      throw new Problem('already-has-place', 'This golfer has a place there already.')
    }
    if (code === FOREIGN_KEY_VIOLATION) {
      throw new Problem('not-on-sale', 'The dates have just been changed. Please choose again.')
    }
    throw error
  }
}
