import { expect, it } from 'vitest'
import { openAcademy, pay, signUp, takePlace } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

it('lets a golfer give up in a withdrawn clinic that others wait for', async () => {
  const academy = await openAcademy(world, { clinic: { capacity: 1 } })
  const { slug, owner, clinic } = academy
  const golfer = await signUp(world)
  const held = await takePlace(golfer, academy, { clinic })
  await pay(world, golfer, { academy, enrolment: held })
  const waiting = await signUp(world)
  const [session] = clinic.sessions
  await waiting.person.must('golfers.add-dependant', {
    params: { academy: slug },
    body: {
      name: 'Oona Tarrant',
      bornOn: '2020-05-02',
      handicap: null,
      emergencyContact: { name: 'Bríd Tarrant', phone: '+353 1 555 0100' },
      hasConsent: true,
    },
  })
  const { golfers } = await waiting.person.must('golfers.mine', { params: { academy: slug } })
  await waiting.person.must('waitlist.join', {
    params: { academy: slug },
    body: { clinicId: clinic.id, sessionId: session!.id, golferId: golfers[0]!.id },
  })
  await owner.person.must('clinics.publish', {
    params: { academy: slug, clinicId: clinic.id },
    body: { isPublished: false },
  })
  const params = { academy: slug, enrolmentId: held.id }
  const quote = await golfer.person.must('checkout.quote-giving-up', { params })
  const { refundMinor } = quote

  const given = await golfer.person.must('checkout.give-up', { params, body: { refundMinor } })

  expect(given).toMatchObject({ state: 'cancelled', endedBecause: 'given-up' })
})
