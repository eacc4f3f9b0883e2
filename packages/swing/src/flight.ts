import type { Air } from './air'
import type { BallModel } from './ball-models'
import { BALL_KG, BALL_RADIUS_METRES, direction, type Launch } from './impact'
import { between, placeAt, shareAtNothing, shareAtTurn, slopeAt, type Between } from './between'
import { beginning, stepFrom, stretchOf, type Moment, type Motion, type Rate } from './runge-kutta'
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
  /** What each step may err by, in metres a second; 1e-3 keeps a carry to a tenth of a millimetre. */
  tolerance?: number
}

const GRAVITY_MPS2 = 9.80665
const AREA_M2 = Math.PI * BALL_RADIUS_METRES ** 2
/** A solid sphere's moment of inertia, as a share of m·r². */
const INERTIA_SHARE = 0.4

const FIRST_STEP_SECONDS = 0.2
const LONGEST_SECONDS = 60

/**
 * Flies a ball by a pair of Runge-Kutta formulas with error control: drag against the air, lift
 * across it by the spin's axis, which keeps its direction, and the spin slowed by the air. No bounce.
 * @throws RangeError for a launch that is not finite, or does not go up from the ground.
 */
export function flightOf(launch: Launch, { air, ball, tolerance = 1e-3 }: FlightOptions): Flight {
  const rateOf = forcesOn(launch, { air, ball })
  let moment = beginning(motionOf(launch), rateOf)
  let apexMetres = 0
  let seconds = FIRST_STEP_SECONDS
  const track = [pointOf(moment)]
  while (moment.seconds < LONGEST_SECONDS) {
    const { to, error } = stepFrom(moment, seconds, rateOf)
    if (error <= tolerance) {
      if (moment.motion[2] > 0 && to.motion[2] <= 0) {
        const height = between(moment, to, 'z')
        apexMetres = placeAt(height, shareAtTurn(height))
      }
      if (to.z <= 0) {
        const { point, ...landing } = landingOf(moment, to, launch)
        return { ...landing, apexMetres, track: [...track, point] }
      }
      moment = to
      track.push(pointOf(moment))
    }
    seconds *= stretchOf({ tolerance, error })
  }
  throw new RangeError('a ball that does not come down has no carry')
}

function motionOf({ speedMps, upDeg, startDeg, spinRpm, tiltDeg }: Launch): Motion {
  const isFinite = [speedMps, upDeg, startDeg, spinRpm, tiltDeg].every(Number.isFinite)
  if (!isFinite || speedMps <= 0 || upDeg <= 0 || upDeg >= 90) {
    throw new RangeError('a launch has a speed, and goes up from the ground')
  }
  const [vx, vy, vz] = scale(direction({ upDeg, rightDeg: startDeg }), speedMps)
  return [vx, vy, vz, (spinRpm * 2 * Math.PI) / 60]
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
function forcesOn(launch: Launch, { air, ball }: Pick<FlightOptions, 'air' | 'ball'>): Rate {
  const [ax, ay, az] = axisOf(launch)
  const { densityKgM3, windAlongMps, windRightMps } = air
  const pressing = (0.5 * densityKgM3 * AREA_M2) / BALL_KG
  const slowing =
    (0.5 * densityKgM3 * AREA_M2 * 2 * BALL_RADIUS_METRES) /
    (INERTIA_SHARE * BALL_KG * BALL_RADIUS_METRES ** 2)
  return (motion) => {
    const ux = motion[0] - windAlongMps
    const uy = motion[1] + windRightMps
    const uz = motion[2]
    const speed = Math.sqrt(ux * ux + uy * uy + uz * uz)
    const spinRatio = speed > 0 ? (motion[3] * BALL_RADIUS_METRES) / speed : 0
    const drag = pressing * ball.drag(speed, spinRatio) * speed
    const lift = pressing * ball.lift(speed, spinRatio) * speed
    return [
      lift * (ay * uz - az * uy) - drag * ux,
      lift * (az * ux - ax * uz) - drag * uy,
      lift * (ax * uy - ay * ux) - drag * uz - GRAVITY_MPS2,
      -slowing * ball.moment(spinRatio) * speed * speed,
    ]
  }
}

/** Where and how a ball came down within a step at whose end it would be under the ground. */
function landingOf(from: Moment, to: Moment, { startDeg }: Launch) {
  const [along, across, height] = [
    between(from, to, 'x'),
    between(from, to, 'y'),
    between(from, to, 'z'),
  ]
  const share = shareAtNothing(height)
  const stepSeconds = to.seconds - from.seconds
  const speedOf = (of: Between): number => slopeAt(of, share) / stepSeconds
  const point = {
    seconds: from.seconds + share * stepSeconds,
    alongMetres: placeAt(along, share),
    rightMetres: -placeAt(across, share),
    heightMetres: 0,
  }
  const start = toRad(startDeg)
  const over = Math.hypot(speedOf(along), speedOf(across))
  return {
    point,
    seconds: point.seconds,
    carryMetres: Math.hypot(point.alongMetres, point.rightMetres),
    sideMetres: point.rightMetres,
    curveMetres: point.rightMetres * Math.cos(start) - point.alongMetres * Math.sin(start),
    landingDeg: toDeg(Math.atan2(-speedOf(height), over)),
    landingSpeedMps: Math.hypot(over, speedOf(height)),
  }
}

const pointOf = ({ seconds, x, y, z }: Moment): FlightPoint => ({
  seconds,
  alongMetres: x,
  rightMetres: -y,
  heightMetres: z,
})
