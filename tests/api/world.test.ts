import { expect, it } from 'vitest'
import { openAcademy, pay, signUp, takePlace } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

it('sells a place from an empty database to a mail with a calendar part', async () => {
  const academy = await openAcademy(world)
  const golfer = await signUp(world)
  const held = await takePlace(golfer, academy, { clinic: academy.clinic })
  expect(held).toMatchObject({ state: 'held', totalMinor: 24_000 })
  expect(held.places).toHaveLength(8)

  const paid = await pay(world, golfer, { academy, enrolment: held })

  expect(paid).toMatchObject({ state: 'confirmed', payment: 'paid' })
  const [, confirmation] = world.mail.messagesTo(golfer.account.email)
  expect(confirmation?.attachments.map(({ type }) => type)).toEqual([
    expect.stringContaining('text/calendar'),
  ])
})

it('lets a hold lapse when its time has run out', async () => {
  const academy = await openAcademy(world)
  const golfer = await signUp(world)
  const held = await takePlace(golfer, academy, { clinic: academy.clinic })
  world.clock.moveTo(new Date(Date.parse(held.heldUntil!) + 1))

  await world.sweep()

  const params = { academy: academy.slug, enrolmentId: held.id }
  const lapsed = await golfer.person.must('enrolments.read', { params })
  expect(lapsed).toMatchObject({ state: 'cancelled', endedBecause: 'lapsed' })
})
