import type { Answer } from '@marram/contract'
import { priceOfRemaining } from '@marram/money'
import { notFound } from '../platform/errors'
import { invariant } from '../platform/invariant'
import type { Services } from '../platform/services'
import { askPageOf } from '../platform/tenancy/transaction'
import { darkMinutesIn } from './light'
import {
  clinicPageOf,
  pageAt,
  type ClinicDetailRow,
  type ClinicPageRow,
  type FaceRow,
  type PageClinicRow,
  type PageRow,
} from './page-queries'
import { describeRule } from './rules'

type PageClinic = Answer<'page.read'>['clinics'][number]

export interface PageReader {
  slug: string
  /** Staff may look at a page before it is put up. */
  maySeeUnpublished: boolean
}

/** The academy's public page: everything on it, true at this moment. */
export async function readAcademyPage(
  { db, clock }: Services,
  reader: PageReader,
): Promise<Answer<'page.read'>> {
  const [page] = await askPageOf<PageRow>(db, reader.slug, pageAt(clock.now()))
  invariant(page, 'the page is one row, whatever is on it')
  const academy = checkFace(page.academy, reader)
  return { ...page, academy, clinics: page.clinics.map(withPriceNow) }
}

function checkFace(academy: FaceRow | null, reader: PageReader): FaceRow {
  if (!academy || !(academy.isPublished || reader.maySeeUnpublished)) throw notFound('academy')
  return academy
}

function withPriceNow({ numbersAhead, ...clinic }: PageClinicRow): PageClinic {
  return { ...clinic, runPriceMinor: priceNow(clinic, numbersAhead) }
}

/** What a golfer who joins a run now pays: the shares of the sessions still to come. */
function priceNow(
  row: { runPriceMinor: number | null; sessionsTotal: number },
  remainingNumbers: readonly number[],
): number | null {
  const { runPriceMinor, sessionsTotal: sessionCount } = row
  if (runPriceMinor === null) return null
  return priceOfRemaining({ runPriceMinor, sessionCount, remainingNumbers }).priceMinor
}

export async function readClinicOnPage(
  { db, clock }: Services,
  reader: PageReader & { clinic: string },
): Promise<Answer<'page.clinic'>> {
  const now = clock.now()
  const [row] = await askPageOf<ClinicPageRow>(db, reader.slug, clinicPageOf(reader.clinic))
  invariant(row, 'the page is one row, whatever is on it')
  const academy = checkFace(row.academy, reader)
  if (!row.clinic) throw notFound('clinic')
  return { academy, clinic: toDetail(row.clinic, now) }
}

function toDetail(row: ClinicDetailRow, now: Date): Answer<'page.clinic'>['clinic'] {
  const { rrule, startsOnLocal, sessions, ...clinic } = row
  const ahead = sessions.filter(
    ({ state, startsAt }) => state === 'planned' && new Date(startsAt) > now,
  )
  const next = ahead[0] ?? sessions.at(-1)
  const fullest = ahead.reduce(
    (a, b) => (b.taken > a.taken ? b : a),
    ahead[0] ?? { taken: 0, capacity: row.capacity },
  )
  const measured = row.saleMode === 'drop-in' ? (ahead[0] ?? fullest) : fullest
  const counts = { sessionsAhead: ahead.length, sessionsTotal: sessions.length }
  return {
    ...clinic,
    ...counts,
    startsAt: next?.startsAt ?? '',
    endsAt: next?.endsAt ?? '',
    recurrence: describeRule({ rrule, zone: row.zone, startsOnLocal }),
    areas: (next?.areas ?? []).map(({ name }) => name),
    coaches: row.coachDetails.map(({ name }) => name),
    capacity: measured.capacity,
    taken: measured.taken,
    runPriceMinor: priceNow(
      { ...row, ...counts },
      ahead.map(({ number }) => number),
    ),
    sessions: sessions.map((session) => ({
      ...session,
      darkMinutes: darkMinutesIn(
        {
          startsAt: new Date(session.startsAt),
          endsAt: new Date(session.endsAt),
          duskAt: session.duskAt ? new Date(session.duskAt) : null,
        },
        session.areas,
      ),
      isPast: new Date(session.startsAt) <= now,
    })),
  }
}
