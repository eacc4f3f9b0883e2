import type { Air } from './air'
import type { BallModel } from './ball-models'
import { BALL_KG, BALL_RADIUS_METRES, direction, type Launch } from './impact'
import { Stepper, partOf as at, stretchOf, type Rate, type State } from './runge-kutta'
import { scale, toDeg, toRad, type Vector } from './vectors'

/** A ball from the face until it is down at the height that it left from. */
export interface Flight {
  /** Over the ground, from where it was struck to where it lands. */
  carryMetres: number
  apexMetres: number
  seconds: number
  /** Where it lands, right of the target line positive. */
  sideMetres: number
  /** How far it lands from the line on which it started, right positive. */
  curveMetres: number
  /** Of its way as it lands, under the horizontal. */
  landingDeg: number
  landingSpeedMps: number
  /** Where it was at the integrator's own steps, the first and the last included. */
  track: FlightPoint[]
}

export interface FlightPoint {
  seconds: number
  alongMetres: number
  rightMetres: number
  heightMetres: number
}

export interface FlightOptions {
  air: Air
  ball: BallModel
  /** What each step may err by, in metres and metres a second. */
  tolerance?: number
}

const GRAVITY_MPS2 = 9.80665
const AREA_M2 = Math.PI * BALL_RADIUS_METRES ** 2
/** A solid sphere's moment of inertia, as a share of m·r². */
const INERTIA_SHARE = 0.4

/** Where the parts of a state stand: x to the target, y left, z up, their rates, the spin in rad/s. */
const [X, Y, Z, VX, VY, VZ, SPIN] = [0, 1, 2, 3, 4, 5, 6] as const
const FIRST_STEP_SECONDS = 0.05
const LONGEST_SECONDS = 60
/** Of a metre or a metre a second, when a moment is looked for within a step. */
const NOTHING = 1e-7
const MOST_TURNS = 12

/**
 * Flies a ball by a pair of Runge-Kutta formulas with error control: drag against the air, lift
 * across it by the spin's axis, which keeps its direction, and the spin slowed by the air. No bounce.
 * @throws RangeError for a launch that is not finite, or does not go up from the ground.
 */
export function flightOf(launch: Launch, { air, ball, tolerance = 1e-4 }: FlightOptions): Flight {
  const stepper = new Stepper(rateOf(launch, { air, ball }), 7)
  let state = stateOf(launch)
  let seconds = 0
  let apexMetres = 0
  let step = FIRST_STEP_SECONDS
  const track = [pointOf(state, seconds)]
  while (seconds < LONGEST_SECONDS) {
    const error = stepper.take(state, step)
    if (error <= tolerance) {
      const next = Float64Array.from(stepper.result)
      if (at(state, VZ) > 0 && at(next, VZ) <= 0) {
        settle(stepper, { from: state, to: next, seconds: step, part: VZ })
        apexMetres = at(stepper.result, Z)
      }
      if (at(next, Z) <= 0) {
        seconds += settle(stepper, { from: state, to: next, seconds: step, part: Z })
        track.push(pointOf(stepper.result, seconds))
        return { ...landingOf(stepper.result, launch), apexMetres, seconds, track }
      }
      seconds += step
      state = next
      track.push(pointOf(state, seconds))
    }
    step *= stretchOf({ tolerance, error })
  }
  throw new RangeError('a ball that does not come down has no carry')
}

function stateOf({ speedMps, upDeg, startDeg, spinRpm, tiltDeg }: Launch): State {
  const isFinite = [speedMps, upDeg, startDeg, spinRpm, tiltDeg].every(Number.isFinite)
  if (!isFinite || speedMps <= 0 || upDeg <= 0 || upDeg >= 90) {
    throw new RangeError('a launch has a speed, and goes up from the ground')
  }
  const way = scale(direction({ upDeg, rightDeg: startDeg }), speedMps)
  return Float64Array.of(0, 0, 0, ...way, (spinRpm * 2 * Math.PI) / 60)
}

/** The spin's axis: across the start, to the right, and tilted; so that backspin lifts. */
function axisOf({ startDeg, tiltDeg }: Launch): Vector {
  const start = toRad(startDeg)
  const tilt = toRad(tiltDeg)
  const right: Vector = [-Math.sin(start), -Math.cos(start), 0]
  return [right[0] * Math.cos(tilt), right[1] * Math.cos(tilt), -Math.sin(tilt)]
}

/**
 * Newton's law for the ball: gravity, drag ½ρV²A·CD against its way through the air, lift ½ρV²A·CL
 * along axis × way, and dω/dt = −½ρV²A·Cm·2r/(0.4·m·r²).
 */
function rateOf(launch: Launch, { air, ball }: Pick<FlightOptions, 'air' | 'ball'>): Rate {
  const [ax, ay, az] = axisOf(launch)
  const { densityKgM3, windAlongMps, windRightMps } = air
  const pressing = (0.5 * densityKgM3 * AREA_M2) / BALL_KG
  const slowing =
    (0.5 * densityKgM3 * AREA_M2 * 2 * BALL_RADIUS_METRES) /
    (INERTIA_SHARE * BALL_KG * BALL_RADIUS_METRES ** 2)
  return (state, into) => {
    const ux = at(state, VX) - windAlongMps
    const uy = at(state, VY) + windRightMps
    const uz = at(state, VZ)
    const speed = Math.sqrt(ux * ux + uy * uy + uz * uz)
    const spinRatio = speed > 0 ? (at(state, SPIN) * BALL_RADIUS_METRES) / speed : 0
    const drag = pressing * ball.drag(speed, spinRatio) * speed
    const lift = pressing * ball.lift(speed, spinRatio) * speed
    into[X] = at(state, VX)
    into[Y] = at(state, VY)
    into[Z] = uz
    into[VX] = lift * (ay * uz - az * uy) - drag * ux
    into[VY] = lift * (az * ux - ax * uz) - drag * uy
    into[VZ] = lift * (ax * uy - ay * ux) - drag * uz - GRAVITY_MPS2
    into[SPIN] = -slowing * ball.moment(spinRatio) * speed * speed
  }
}

/**
 * Finds when a part of the state is nothing within a step, and leaves the state of that moment in
 * the stepper. Resolves to the seconds from the step's beginning.
 */
function settle(
  stepper: Stepper,
  step: { from: State; to: State; seconds: number; part: number },
): number {
  const { from, to, part } = step
  const slope = (at(to, part) - at(from, part)) / step.seconds
  let seconds = -at(from, part) / slope
  if (part === Z) seconds = step.seconds - at(to, Z) / at(to, VZ)
  for (let turn = 0; turn < MOST_TURNS; turn += 1) {
    stepper.take(from, seconds)
    const rest = at(stepper.result, part)
    if (Math.abs(rest) < NOTHING) break
    seconds -= rest / (part === Z ? at(stepper.result, VZ) : slope)
  }
  return seconds
}

function landingOf(state: State, { startDeg }: Launch) {
  const [x, right] = [at(state, X), -at(state, Y)]
  const start = toRad(startDeg)
  const over = Math.hypot(at(state, VX), at(state, VY))
  return {
    carryMetres: Math.hypot(x, right),
    sideMetres: right,
    curveMetres: right * Math.cos(start) - x * Math.sin(start),
    landingDeg: toDeg(Math.atan2(-at(state, VZ), over)),
    landingSpeedMps: Math.hypot(over, at(state, VZ)),
  }
}

function pointOf(state: State, seconds: number): FlightPoint {
  return {
    seconds,
    alongMetres: at(state, X),
    rightMetres: -at(state, Y),
    heightMetres: Math.max(0, at(state, Z)),
  }
}
