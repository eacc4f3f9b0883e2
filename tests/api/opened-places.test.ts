import { expect, it } from 'vitest'
import { clinicFields, openAcademy, signUp, takePlace } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

it('offers places that are opened to those who wait', async () => {
  const academy = await openAcademy(world, { clinic: { capacity: 1 } })
  const { slug, owner, clinic } = academy
  const params = { academy: slug }
  await takePlace(await signUp(world), academy, { clinic })
  const waiting = await signUp(world)
  await waiting.person.must('waitlist.join', { params, body: { clinicId: clinic.id } })

  await owner.person.must('clinics.change', {
    params: { ...params, clinicId: clinic.id },
    body: { ...clinicFields(academy), capacity: 2 },
  })
  await world.drain()

  const { enrolments } = await waiting.person.must('enrolments.mine', { params })
  expect(enrolments).toMatchObject([{ state: 'held', isOffer: true }])
})

it('moves no session that is ahead into the past', async () => {
  const { slug, owner, clinic } = await openAcademy(world)
  const params = { academy: slug, sessionId: clinic.sessions[0]!.id }
  const body = { startsOnLocal: '2031-03-02' }
  const reply = await owner.person.call('sessions.change', { params, body })
  expect(reply.problem?.fields).toHaveProperty('startsOnLocal')
})
