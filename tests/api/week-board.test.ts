import { describe, expect, it } from 'vitest'
import { clinicFields, joinStaff, openAcademy, pay, signUp, takePlace } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

const DAY = '2031-04-01'

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
