import { expect, it } from 'vitest'
import { joinStaff, openAcademy, pay, signUp, takePlace } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

it('has the clinic’s money on it only for those who may read the ledger', async () => {
  const academy = await openAcademy(world)
  const golfer = await signUp(world)
  const held = await takePlace(golfer, academy, { clinic: academy.clinic })
  await pay(world, golfer, { academy, enrolment: held })
  const coach = await joinStaff(world, academy, { role: 'coach', coachId: academy.coach.id })
  const desk = await joinStaff(world, academy, { role: 'desk' })

  const params = { academy: academy.slug, clinicId: academy.clinic.id }
  const { money, rows } = await academy.owner.person.must('register.card', { params })
  expect(money).toMatchObject({ paidMinor: 24_000, earnedMinor: 0 })
  for (const { person } of [coach, desk]) {
    expect(await person.must('register.card', { params })).toMatchObject({ money: null, rows })
  }
})
