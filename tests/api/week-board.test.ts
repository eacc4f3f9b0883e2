import { describe, expect, it } from 'vitest'
import {
  clinicFields,
  joinStaff,
  openAcademy,
  pay,
  publishClinic,
  signUp,
  takePlace,
} from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

const DAY = '2031-04-01'
const DENVER = 'America/Denver'

describe('the week board and the day sheet', () => {
  it('show the sessions of a clinic that was taken off the page, with their golfers', async () => {
    const academy = await openAcademy(world)
    const { slug, owner, clinic } = academy
    const coach = await joinStaff(world, academy, { role: 'coach', coachId: academy.coach.id })
    const golfer = await signUp(world)
    const held = await takePlace(golfer, academy, { clinic })
    await pay(world, golfer, { academy, enrolment: held })
    const params = { academy: slug }
    const body = { isPublished: false }
    await owner.person.must('clinics.publish', { params: { ...params, clinicId: clinic.id }, body })

    const query = { from: DAY, to: DAY }
    const { sessions } = await owner.person.must('sessions.list', { params, query })
    expect(sessions.map(({ clinicId }) => clinicId)).toEqual([clinic.id])
    const day = { params: { ...params, date: DAY } }
    const { registers } = await coach.person.must('register.day', day)
    expect(registers.map(({ rows }) => rows.length)).toEqual([1])
  })

  it('go by the calendar of the venue where it is in another zone', async () => {
    const academy = await openAcademy(world)
    const params = { academy: academy.slug }
    const { person } = academy.owner
    const body = { name: 'High Range', latitudeDeg: 39.7, longitudeDeg: -105, zone: DENVER }
    const venue = await person.must('venues.add', { params, body })
    const area = await person.must('areas.add', {
      params: { ...params, venueId: venue.id },
      body: { name: 'Range', kind: 'range', units: 12, hasLamps: true, isCovered: true },
    })
    const coach = await person.must('coaches.add', { params, body: { name: 'Ines Marlow' } })
    // The first of April there has become the second in Dublin.
    const clinic = await publishClinic(
      { ...academy, venue, area, coach },
      { startsAtLocal: '22:00', rrule: 'FREQ=DAILY;COUNT=1' },
    )

    const held = async (day: string) => {
      const query = { from: day, to: day }
      const { sessions } = await person.must('sessions.list', { params, query })
      const date = { params: { ...params, date: day } }
      const { registers } = await person.must('register.day', date)
      expect(registers.map(({ session }) => session.id)).toEqual(sessions.map(({ id }) => id))
      return sessions.filter(({ clinicId }) => clinicId === clinic.id)
    }
    expect(await held(DAY)).toMatchObject([{ heldOn: DAY, zone: DENVER }])
    expect(await held('2031-04-02')).toEqual([])
  })

  it('leave drafts out', async () => {
    const academy = await openAcademy(world)
    const { slug, owner, clinic } = academy
    const params = { academy: slug }
    const body = { ...clinicFields(academy), title: 'Bunkers' }
    await owner.person.must('clinics.draft', { params, body })

    const query = { from: DAY, to: DAY }
    const board = await owner.person.must('sessions.list', { params, query })
    expect(board.sessions.map(({ clinicId }) => clinicId)).toEqual([clinic.id])
  })
})
