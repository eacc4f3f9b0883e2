import { connect } from '../../../apps/api/src/platform/db/connect'
import {
  publishClinic,
  signUp,
  type ClinicView,
  type EnrolmentView,
  type OpenAcademy,
  type SignedUp,
} from '../../support/builders'
import type { World } from '../../support/world'

export const GOLFERS = 200
export const PLACES = 12

/** People who all have their finger on the button. Some at a time: passwords are slow by design. */
export async function gatherGolfers(world: World, count: number): Promise<SignedUp[]> {
  const golfers: SignedUp[] = []
  while (golfers.length < count) {
    const some = Math.min(8, count - golfers.length)
    golfers.push(...(await Promise.all(Array.from({ length: some }, () => signUp(world)))))
  }
  return golfers
}

/** A clinic of four weeks for twelve, each round at an hour of its own. */
export const hotClinic = (
  academy: OpenAcademy,
  { round, capacity = PLACES }: { round: number; capacity?: number },
): Promise<ClinicView> =>
  publishClinic(academy, {
    title: `Wedges to a number, ${round}`,
    capacity,
    saleMode: 'run',
    startsOnLocal: '2031-04-02',
    startsAtLocal: `${8 + round}:00`.padStart(5, '0'),
    rrule: 'FREQ=WEEKLY;COUNT=4',
  })

export interface Rush {
  held: { golfer: SignedUp; enrolment: EnrolmentView }[]
  refused: { golfer: SignedUp; code: string | undefined; detail: string | undefined }[]
}

/** Everybody presses at the same moment. */
export async function rushFor(
  academy: OpenAcademy,
  clinic: ClinicView,
  golfers: readonly SignedUp[],
): Promise<Rush> {
  const params = { academy: academy.slug }
  const body = { clinicId: clinic.id, for: { kind: 'me' }, hasAcceptedWaiver: true } as const
  const rush: Rush = { held: [], refused: [] }
  await Promise.all(
    golfers.map(async (golfer) => {
      const reply = await golfer.person.call('enrolments.hold', { params, body })
      if (reply.status === 200) rush.held.push({ golfer, enrolment: reply.answer })
      else {
        const { code, detail } = reply.problem ?? {}
        rush.refused.push({ golfer, code, detail })
      }
    }),
  )
  return rush
}

export interface Seats {
  capacity: number
  held: number
  confirmed: number
  /** Rows of places, counted apart from the session's own numbers. */
  placesHeld: number
  placesConfirmed: number
}

/** What the database says of each session of a clinic, in order. */
export async function readSeats(world: World, clinic: ClinicView): Promise<Seats[]> {
  const superuser = connect({ url: world.database.superuserUrl, poolSize: 1, name: 'tests' })
  try {
    const { rows } = await superuser.raw<{ rows: Seats[] }>(
      `SELECT s.capacity, s.held, s.confirmed,
         count(*) FILTER (WHERE p.state = 'held') AS places_held,
         count(*) FILTER (WHERE p.state = 'confirmed') AS places_confirmed
       FROM sessions s LEFT JOIN places p ON p.academy_id = s.academy_id AND p.session_id = s.id
       WHERE s.clinic_id = ? GROUP BY s.academy_id, s.id ORDER BY s.number`,
      [clinic.id],
    )
    return rows
  } finally {
    await superuser.destroy()
  }
}

/** Says what is wrong with the seats, or null: no more than there are, and as many as places. */
export function wrongSeats(sessions: readonly Seats[]): string | null {
  for (const { capacity, held, confirmed, placesHeld, placesConfirmed } of sessions) {
    if (placesHeld + placesConfirmed > capacity) {
      return `${placesHeld + placesConfirmed} places were sold of ${capacity}`
    }
    if (held !== placesHeld || confirmed !== placesConfirmed) return 'the session counts wrongly'
  }
  return null
}
