import { expect, it } from 'vitest'
import { openAcademy, signUp, takePlace } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

it('lets somebody wait who has never been here, and offers them the freed place', async () => {
  const academy = await openAcademy(world, { clinic: { capacity: 1, handicapMax: 28 } })
  const { slug, clinic, owner } = academy
  const params = { academy: slug }
  const first = await signUp(world)
  const held = await first.person.must('enrolments.hold', {
    params,
    body: { clinicId: clinic.id, for: { kind: 'me', handicap: 12 }, hasAcceptedWaiver: true },
  })
  const newcomer = await signUp(world)
  const body = { clinicId: clinic.id, handicap: 20 }

  const entry = await newcomer.person.must('waitlist.join', { params, body })
  expect(await newcomer.person.must('waitlist.join', { params, body })).toEqual(entry)

  await first.person.must('enrolments.release', { params: { ...params, enrolmentId: held.id } })
  const { enrolments } = await newcomer.person.must('enrolments.mine', { params })
  expect(enrolments).toMatchObject([{ state: 'held', isOffer: true }])
  await expect(takePlace(owner, academy, { clinic })).rejects.toThrow()
})
