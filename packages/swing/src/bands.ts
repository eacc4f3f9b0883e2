import type { Air } from './air'
import { BALL_MODELS } from './ball-models'
import { flightOf, type Flight } from './flight'
import type { Launch } from './impact'

/** What is worked out is never one number: from the least to the most. */
export interface Band {
  from: number
  to: number
}

export const bandOf = (values: readonly number[]): Band => ({
  from: Math.min(...values),
  to: Math.max(...values),
})

/** Whether two bands share no value, so that one is settled to be the larger. */
export const isSettled = (one: Band, other: Band): boolean =>
  one.to < other.from || other.to < one.from

/** A flight as every ball model has it, for each launch that may have been. */
export interface FlightBand {
  startDeg: Band
  carryMetres: Band
  curveMetres: Band
  sideMetres: Band
  apexMetres: Band
  seconds: Band
  landingDeg: Band
}

const FLOWN = [
  'carryMetres',
  'curveMetres',
  'sideMetres',
  'apexMetres',
  'seconds',
  'landingDeg',
] as const satisfies readonly (keyof Flight)[]

/**
 * Flies one or more launches, as the bounding cases of a delivery, by every ball model.
 * @throws RangeError where there is none, or one does not go up from the ground.
 */
export function flightBand(launches: readonly Launch[], air: Air): FlightBand {
  if (launches.length === 0) throw new RangeError('no ball was struck')
  const flights = launches.flatMap((launch) =>
    BALL_MODELS.map((ball) => flightOf(launch, { air, ball })),
  )
  const flown = FLOWN.map((figure) => [figure, bandOf(flights.map((flight) => flight[figure]))])
  return {
    startDeg: bandOf(launches.map(({ startDeg }) => startDeg)),
    // Each figure that is flown was given its band above.
    ...(Object.fromEntries(flown) as Record<(typeof FLOWN)[number], Band>),
  }
}
