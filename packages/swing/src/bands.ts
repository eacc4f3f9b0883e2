import type { Air } from './air'
import { BALL_MODELS, type BallModel } from './ball-models'
import { flightOf, type Flight } from './flight'
import type { Launch } from './impact'

/** What is worked out is never one number: from the least to the most. */
export interface Band {
  least: number
  most: number
}

export const bandOf = (values: readonly number[]): Band => ({
  least: Math.min(...values),
  most: Math.max(...values),
})

/** Whether two bands share no value, so that one is settled to be the larger. */
export const isSettled = (one: Band, other: Band): boolean =>
  one.most < other.least || other.most < one.least

const FIGURES = [
  'startDeg',
  'curveMetres',
  'sideMetres',
  'carryMetres',
  'apexMetres',
  'seconds',
  'landingDeg',
] as const
type Figures = Record<(typeof FIGURES)[number], number>

/** A flight as every ball model has it, for each launch that may have been. */
export type FlightBand = Record<keyof Figures, Band> & { rises: 'always' | 'sometimes' | 'never' }

/**
 * Flies one or more launches, as the bounding cases of a delivery, by every ball model. A ball that
 * does not rise carries nothing, and starts where the face sends it.
 * @throws RangeError where there is no launch.
 */
export function flightBand(launches: readonly Launch[], air: Air): FlightBand {
  if (launches.length === 0) throw new RangeError('no ball was struck')
  const flown = launches.flatMap((launch) => BALL_MODELS.map((ball) => fly(launch, { air, ball })))
  const bands = FIGURES.map((figure) => [figure, bandOf(flown.map((flight) => flight[figure]))])
  const risen = launches.filter(doesRise).length
  return {
    // Each figure is there once, which an object made of pairs no longer tells.
    ...(Object.fromEntries(bands) as Record<keyof Figures, Band>),
    rises: risen === launches.length ? 'always' : risen > 0 ? 'sometimes' : 'never',
  }
}

const doesRise = ({ upDeg, speedMps }: Launch): boolean => speedMps > 0 && upDeg > 0 && upDeg < 90

function fly(launch: Launch, through: { air: Air; ball: BallModel }): Figures {
  const { startDeg } = launch
  return doesRise(launch)
    ? { ...flightOf(launch, through), startDeg }
    : { ...ALONG_THE_GROUND, startDeg }
}

const ALONG_THE_GROUND: Omit<Flight, 'track' | 'landingSpeedMps'> = {
  curveMetres: 0,
  sideMetres: 0,
  carryMetres: 0,
  apexMetres: 0,
  seconds: 0,
  landingDeg: 0,
}

/** A left-hander's flight is a right-hander's in the mirror. */
export function mirrored(flight: FlightBand): FlightBand {
  const turned = ({ least, most }: Band): Band => ({ least: 0 - most, most: 0 - least })
  return {
    ...flight,
    startDeg: turned(flight.startDeg),
    curveMetres: turned(flight.curveMetres),
    sideMetres: turned(flight.sideMetres),
  }
}
