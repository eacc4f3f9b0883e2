import type { Answer, Parsed } from '@marram/contract'
import { toLocal, transitionsBetween } from '@marram/schedule'
import { readAcademy, type Academy } from '../academies/academies'
import type { Services } from '../platform/services'
import { inAcademy } from '../platform/tenancy/transaction'
import type { Venue } from '../venues/venues'
import { findClashes } from './clashes'
import { listHolidays } from './holidays'
import { darkMinutesIn, duskOver } from './light'
import { planClinic } from './plan'

type Preview = Answer<'clinics.preview'>

const DAY_MS = 86_400_000
const MARGIN_DAYS = 7
/** The light chart needs no more points than this, however long the run. */
const MOST_LIGHT_DAYS = 400

/** Everything an editor shows while a clinic is being written; saves nothing. */
export async function previewClinic(
  { db, clock }: Services,
  { academyId, wanted }: { academyId: string; wanted: Parsed<'clinics.preview', 'body'> },
): Promise<Preview> {
  return inAcademy(
    db,
    academyId,
    async (trx) => {
      const academy = await readAcademy(trx)
      const { venue, areas, dates, recurrence } = await planClinic(trx, wanted)
      const clashes = await findClashes(trx, {
        times: dates.map((date) => ({ key: String(date.number), ...date })),
        coachIds: wanted.coachIds,
        areas: wanted.areas,
        zone: venue.zone,
        locale: academy.locale,
        ...(wanted.clinicId ? { exceptClinicId: wanted.clinicId } : {}),
      })
      const now = clock.now()
      const span = { from: dates[0]?.startsAt ?? now, to: dates.at(-1)?.endsAt ?? now }
      return {
        recurrence,
        dates: dates.map(({ number, startsOnLocal, startsAt, endsAt }) => {
          const duskAt = duskOver(venue, { dayLocal: startsOnLocal, duskKind: academy.duskKind })
          return {
            number,
            startsOnLocal,
            startsAt: startsAt.toISOString(),
            endsAt: endsAt.toISOString(),
            duskAt: duskAt?.toISOString() ?? null,
            darkMinutes: darkMinutesIn({ startsAt, endsAt, duskAt }, areas),
            isPast: startsAt <= now,
            clashes: clashes.get(String(number)) ?? [],
          }
        }),
        light: lightOver({ venue, academy, ...span }),
        clockChanges: transitionsBetween({ zone: venue.zone, ...span }).map(
          ({ dayLocal, direction }) => ({ dayLocal, direction }),
        ),
        holidays: await listHolidays({ zone: venue.zone, ...span }),
      }
    },
    { readOnly: true },
  )
}

function lightOver(given: {
  venue: Venue
  academy: Academy
  from: Date
  to: Date
}): Preview['light'] {
  const { venue, academy } = given
  const from = given.from.getTime() - MARGIN_DAYS * DAY_MS
  const days = Math.ceil((given.to.getTime() - from) / DAY_MS) + MARGIN_DAYS
  const light: Preview['light'] = []
  for (let day = 0; day <= Math.min(days, MOST_LIGHT_DAYS); day += 1) {
    const { dayLocal } = toLocal({ at: new Date(from + day * DAY_MS), zone: venue.zone })
    const dusk = duskOver(venue, { dayLocal, duskKind: academy.duskKind })
    light.push({
      dayLocal,
      duskLocalMinutes: dusk ? minutesOfDay(dusk, venue.zone, dayLocal) : null,
    })
  }
  return light
}

/** Minutes after local midnight of the day; over 1440 where dusk falls after midnight. */
function minutesOfDay(at: Date, zone: string, dayLocal: string): number {
  const local = toLocal({ at, zone })
  const [hours = 0, minutes = 0] = local.timeLocal.split(':').map(Number)
  return hours * 60 + minutes + (local.dayLocal > dayLocal ? 1_440 : 0)
}
