import { beforeAll, describe, expect, it } from 'vitest'
import { asSuperuser } from '../support/books'
import {
  joinStaff,
  openAcademy,
  pay,
  signUp,
  type OpenAcademy,
  type SignedUp,
} from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

const DAY_MS = 86_400_000

let academy: OpenAcademy
let coach: SignedUp
let desk: SignedUp
let golferId: string

/** A junior with a place in one session, whose guardian said whom to call. */
beforeAll(async () => {
  academy = await openAcademy(world, { clinic: { startsOnLocal: '2031-03-18' } })
  coach = await joinStaff(world, academy, { role: 'coach', coachId: academy.coach.id })
  desk = await joinStaff(world, academy, { role: 'desk' })
  const guardian = await signUp(world, { name: 'Orla Tarrant' })
  const held = await guardian.person.must('enrolments.hold', {
    params: { academy: academy.slug },
    body: {
      clinicId: academy.clinic.id,
      sessionId: academy.clinic.sessions[0]!.id,
      for: {
        kind: 'new',
        dependant: {
          name: 'Fionn Tarrant',
          bornOn: '2020-05-02',
          handicap: null,
          emergencyContact: { name: 'Bríd Tarrant', phone: '+353 1 555 0100' },
          hasConsent: true,
        },
      },
      hasAcceptedWaiver: true,
    },
  })
  golferId = held.golfer.id
  await pay(world, guardian, { academy, enrolment: held })
})

const open = ({ person }: SignedUp) =>
  person.must('golfers.read', { params: { academy: academy.slug, golferId } })

const countLookUps = () =>
  asSuperuser(world, async (db) => (await db('minorLookUps').where({ golferId })).length)

const SHOWN = {
  hasContacts: true,
  guardianName: 'Orla Tarrant',
  emergencyContact: { name: 'Bríd Tarrant' },
  consents: [{}, {}],
}
const HIDDEN = {
  name: 'Fionn Tarrant',
  isJunior: true,
  hasContacts: false,
  guardianName: null,
  emergencyContact: null,
  consents: [],
}

describe('the contacts of a junior', () => {
  it.each([
    { when: 'more than a week before', from: 'startsAt', ms: -7 * DAY_MS - 1, isShown: false },
    { when: 'a week before', from: 'startsAt', ms: -7 * DAY_MS, isShown: true },
    { when: 'a week after', from: 'endsAt', ms: 7 * DAY_MS, isShown: true },
    { when: 'more than a week after', from: 'endsAt', ms: 7 * DAY_MS + 1, isShown: false },
  ] as const)('are shown to their coach $when: $isShown', async ({ from, ms, isShown }) => {
    world.clock.moveTo(new Date(Date.parse(academy.clinic.sessions[0]![from]) + ms))
    const before = await countLookUps()

    expect(await open(coach)).toMatchObject(isShown ? SHOWN : HIDDEN)
    const { golfers } = await coach.person.must('golfers.list', {
      params: { academy: academy.slug },
    })
    expect(golfers).toMatchObject([{ guardianName: isShown ? 'Orla Tarrant' : null }])
    expect((await countLookUps()) - before).toBe(isShown ? 1 : 0)
  })

  it('are shown to the desk at any time, and each look is written down', async () => {
    world.clock.moveBy(DAY_MS)
    const before = await countLookUps()
    expect(await open(desk)).toMatchObject(SHOWN)
    expect((await countLookUps()) - before).toBe(1)
  })
})
