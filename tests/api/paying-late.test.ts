import { expect, it } from 'vitest'
import { openAcademy, pay, signUp, takePlace } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

it('begins another payment page when a long hold has outlived the first', async () => {
  const academy = await openAcademy(world)
  const { slug, owner, clinic } = academy
  await owner.person.must('academies.change', {
    params: { academy: slug },
    body: { holdMinutes: 60 },
  })
  const golfer = await signUp(world)
  const held = await takePlace(golfer, academy, { clinic })
  const params = { academy: slug, enrolmentId: held.id }
  const first = await golfer.person.must('checkout.start', { params })
  expect(await golfer.person.must('checkout.start', { params })).toEqual(first)

  world.clock.moveTo(new Date(world.clock.now().getTime() + 40 * 60_000))
  const later = await golfer.person.must('checkout.start', { params })

  expect(later.url).not.toBe(first.url)
  const paid = await pay(world, golfer, { academy, enrolment: held })
  expect(paid).toMatchObject({ state: 'confirmed', payment: 'paid' })
})
