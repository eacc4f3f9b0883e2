import type { Answer, Sent } from '@marram/contract'
import {
  joinStaff,
  openAcademy,
  pay,
  signUp,
  takePlace,
  type OpenAcademy,
  type SignedUp,
} from './builders'
import type { Reply } from './person'
import type { World } from './world'

export type SwingView = Answer<'swings.read'>
export type Comparison = Answer<'swings.compare'>
export type NewSwing = Sent<'swings.record', 'body'>

type Angles = NewSwing['wrist']['address']

/** A lead wrist as coaches say it, in degrees: extension, and towards the little finger. */
export const wrist = (extensionDeg: number, ulnarDeg: number): Angles => ({
  flexionDeg: -extensionDeg,
  ulnarDeg,
})

/** A swing with a seven-iron that holds its extension to impact, read by a sensor. */
export function swingFields(change: Partial<NewSwing> = {}): NewSwing {
  return {
    club: '7-iron',
    method: 'sensor',
    wrist: { address: wrist(28, 5), top: wrist(44, -15), impact: wrist(18, -5) },
    ball: { start: 'pulled', curve: 'slice', height: 'high', contact: 'fat', distanceMetres: 112 },
    ...change,
  }
}

/** An academy whose coach has two golfers: one with a run, and a child with a drop-in. */
export interface Bench {
  academy: OpenAcademy
  coach: SignedUp
  golfer: SignedUp
  golferId: string
  guardian: SignedUp
  childId: string
  inAcademy: (more?: Record<string, string>) => Record<string, string>
  /** Sends a swing, as the coach and of the golfer unless it is said otherwise. */
  record: (
    change?: Partial<NewSwing>,
    given?: { by?: SignedUp; of?: string },
  ) => Promise<Reply<SwingView>>
  /** As `record`, for a swing that is taken. */
  recorded: (
    change?: Partial<NewSwing>,
    given?: { by?: SignedUp; of?: string },
  ) => Promise<SwingView>
  /** Two that are taken, a minute apart; resolves to their ids. */
  twoSwings: (
    one: Partial<NewSwing>,
    other: Partial<NewSwing>,
  ) => Promise<[earlier: string, later: string]>
  compare: (swingId: string, other: string) => Promise<Reply<Comparison>>
  compared: (swingId: string, other: string) => Promise<Comparison>
}

export async function openBench(world: World): Promise<Bench> {
  const academy = await openAcademy(world)
  const coach = await joinStaff(world, academy, { role: 'coach', coachId: academy.coach.id })
  const golfer = await signUp(world)
  const held = await takePlace(golfer, academy, { clinic: academy.clinic })
  const { id: golferId } = (await pay(world, golfer, { academy, enrolment: held })).golfer
  const guardian = await signUp(world)
  const childId = await bringChild(world, { academy, guardian })
  const inAcademy: Bench['inAcademy'] = (more = {}) => ({ academy: academy.slug, ...more })
  const record: Bench['record'] = (change = {}, { by = coach, of = golferId } = {}) =>
    by.person.call('swings.record', {
      params: inAcademy({ golferId: of }),
      body: swingFields(change),
    })
  const recorded: Bench['recorded'] = async (...given) => {
    const { status, text, answer } = await record(...given)
    if (status !== 200) throw new Error(text)
    return answer
  }
  const twoSwings: Bench['twoSwings'] = async (one, other) => {
    const earlier = await recorded(one)
    world.clock.moveBy(60_000)
    return [earlier.id, (await recorded(other)).id]
  }
  const compare: Bench['compare'] = (swingId, other) =>
    coach.person.call('swings.compare', {
      params: inAcademy({ swingId }),
      query: { with: other },
    })
  const compared: Bench['compared'] = async (...given) => {
    const { status, text, answer } = await compare(...given)
    if (status !== 200) throw new Error(text)
    return answer
  }
  return {
    ...{ academy, coach, golfer, golferId, guardian, childId, inAcademy },
    ...{ record, recorded, twoSwings, compare, compared },
  }
}

/** What became of each angle: where, by how much, and whether that is a change. */
export const tableOf = ({ differences }: Comparison) =>
  differences?.map(({ position, axis, differenceDeg, isChange }) => [
    `${position} ${axis}`,
    differenceDeg,
    isChange,
  ])

/** A child with a place in the second session; resolves to the child's golfer. */
async function bringChild(
  world: World,
  { academy, guardian }: { academy: OpenAcademy; guardian: SignedUp },
): Promise<string> {
  const dependant = {
    name: 'Fionn Tarrant',
    bornOn: '2020-05-02',
    handicap: null,
    emergencyContact: { name: 'Bríd Tarrant', phone: '+353 1 555 0100' },
    hasConsent: true,
  } as const
  const enrolment = await guardian.person.must('enrolments.hold', {
    params: { academy: academy.slug },
    body: {
      clinicId: academy.clinic.id,
      sessionId: academy.clinic.sessions[1]!.id,
      for: { kind: 'new', dependant },
      hasAcceptedWaiver: true,
    },
  })
  await pay(world, guardian, { academy, enrolment })
  return enrolment.golfer.id
}

/**
 * [P] The pair that coaches know, with a seven-iron and a sensor: 28 → 44 → 18 degrees of extension
 * slices, 30 → 33 → 6 is straight, lower and longer.
 */
export const SLICE: NewSwing['wrist'] = {
  address: wrist(28, 5),
  top: wrist(44, -15),
  impact: wrist(18, -5),
}
export const STRAIGHT: NewSwing['wrist'] = {
  address: wrist(30, 5),
  top: wrist(33, -15),
  impact: wrist(6, 2),
}
