import {
  openAcademy,
  pay,
  publishClinic,
  signUp,
  takePlace,
  type ClinicView,
  type EnrolmentView,
  type OpenAcademy,
  type SignedUp,
} from '../../support/builders'
import type { World } from '../../support/world'

export interface Waiting extends SignedUp {
  golferId: string
}

/** A clinic with one place, who has it, and people who are golfers here without one. */
export interface FullClinic {
  academy: OpenAcademy
  clinic: ClinicView
  owner: SignedUp
  enrolment: EnrolmentView
  others: Waiting[]
}

export async function fillClinic(world: World, others: number): Promise<FullClinic> {
  const academy = await openAcademy(world, { clinic: { capacity: 1 } })
  const roomy = await publishClinic(academy, {
    title: 'Holing out',
    capacity: 40,
    startsOnLocal: '2031-04-02',
    rrule: 'FREQ=WEEKLY;COUNT=2',
  })
  const { clinic } = academy
  const owner = await signUp(world)
  const held = await takePlace(owner, academy, { clinic })
  const enrolment = await pay(world, owner, { academy, enrolment: held })
  const waiting: Waiting[] = []
  while (waiting.length < others) {
    const person = await signUp(world)
    const { golfer } = await takePlace(person, academy, { clinic: roomy })
    waiting.push({ ...person, golferId: golfer.id })
  }
  return { academy, clinic, owner, enrolment, others: waiting }
}

export const join = ({ academy, clinic }: FullClinic, who: Waiting, sessionId?: string) =>
  who.person.call('waitlist.join', {
    params: { academy: academy.slug },
    body: { clinicId: clinic.id, golferId: who.golferId, ...(sessionId ? { sessionId } : {}) },
  })

/** What a person sees of the full clinic: their enrolment in it, and their place in its queue. */
export async function look({ academy, clinic }: FullClinic, { person }: SignedUp) {
  const params = { academy: academy.slug }
  const { enrolments, waitlist } = await person.must('enrolments.mine', { params })
  return {
    enrolment: enrolments.find((enrolment) => enrolment.clinic.id === clinic.id),
    entry: waitlist.find((entry) => entry.clinic.slug === clinic.slug),
  }
}

/** The one who has the place gives it up, for what the policy gives back. */
export async function giveUp(world: World, full: FullClinic): Promise<void> {
  const { academy, owner, enrolment } = full
  const params = { academy: academy.slug, enrolmentId: enrolment.id }
  const { refundMinor } = await owner.person.must('checkout.quote-giving-up', { params })
  await owner.person.must('checkout.give-up', { params, body: { refundMinor } })
  await world.drain()
}
