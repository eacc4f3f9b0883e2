import { misfitOf, misfitSentence } from '../golfers/golfers'
import { Problem, notFound } from '../platform/errors'
import { localDayOf } from '../platform/local-day'
import type { AcademyTrx } from '../platform/tenancy/transaction'
import {
  readOffer,
  type AcademyOnSale,
  type ClinicOnSale,
  type GolferToPlace,
  type SessionOnSale,
} from './on-sale-queries'
import { agreePrice, sessionsAhead, type AgreedPrice } from './rules'

export interface WantedPlaces {
  clinicId: string
  /** Left out for the whole run. */
  sessionId?: string | undefined
}

export interface OnSale {
  academy: AcademyOnSale
  clinic: ClinicOnSale
  kind: 'run' | 'session'
  /** The sessions in which a place is taken. */
  taken: SessionOnSale[]
  price: AgreedPrice
}

/** What is for sale at this moment of what is wanted, and for how much. Throws `not-on-sale`. */
export async function findOnSale(
  trx: AcademyTrx,
  wanted: WantedPlaces,
  now: Date,
): Promise<OnSale> {
  const offer = await readOffer(trx, wanted.clinicId)
  if (!offer || offer.clinic.state === 'draft') throw notFound('clinic')
  const { academy, clinic, sessions } = offer
  if (clinic.state !== 'published') throw notOnSale('This clinic is no longer on the page.')
  const kind = wanted.sessionId ? 'session' : 'run'
  if (kind === 'run' && clinic.saleMode === 'drop-in') {
    throw notOnSale('This clinic is sold session by session. Please choose a date.')
  }
  if (kind === 'session' && clinic.saleMode === 'run') {
    throw notOnSale('This clinic is sold as a whole run.')
  }
  if (wanted.sessionId && !sessions.some(({ id }) => id === wanted.sessionId)) {
    throw notFound('session')
  }
  const ahead = sessionsAhead(sessions, now)
  const taken = wanted.sessionId ? ahead.filter(({ id }) => id === wanted.sessionId) : ahead
  if (taken.length === 0) throw notOnSale('This has begun or was called off.')
  const price = agreePrice({
    wanted: kind === 'session' ? { kind } : { kind, sessionCount: sessions.length },
    taken,
    runPriceMinor: clinic.runPriceMinor,
    dropInPriceMinor: clinic.dropInPriceMinor,
    isFree: clinic.payMode === 'free',
    tax: { mode: academy.taxMode, basisPoints: academy.taxBasisPoints },
  })
  return { academy, clinic, kind, taken, price }
}

/** An academy that is not open yet sells nothing by itself; its staff may give places all the same. */
export function checkOpen({ academy }: OnSale): void {
  if (!academy.isOpen) throw notOnSale('This academy is not open yet.')
}

const notOnSale = (sentence: string) => new Problem('not-on-sale', sentence)

/** Throws `golfer-does-not-fit` with the reason in words. */
export function checkFit(golfer: GolferToPlace, { clinic, taken }: OnSale): void {
  const [first] = taken
  const day = first ? localDayOf(first.startsAt, clinic.zone) : ''
  const isAccountHolder = golfer.accountId !== null
  const misfit = misfitOf({ ...golfer, isAccountHolder }, clinic, day)
  if (misfit) {
    throw new Problem('golfer-does-not-fit', misfitSentence(misfit, golfer.name, clinic))
  }
}
