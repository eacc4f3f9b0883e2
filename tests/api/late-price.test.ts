import { expect, it } from 'vitest'
import { openAcademy, signUp, takePlace } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

it.each([
  { calledOff: 1, priceMinor: 6_666 },
  { calledOff: 2, priceMinor: 6_667 },
  { calledOff: 3, priceMinor: 6_667 },
])('is shown as it is charged with session $calledOff called off', async (given) => {
  const run = { rrule: 'FREQ=WEEKLY;BYDAY=TU;COUNT=3', runPriceMinor: 10_000 }
  const academy = await openAcademy(world, { clinic: run })
  const { slug, owner, clinic } = academy
  const sessionId = clinic.sessions[given.calledOff - 1]!.id
  const params = { academy: slug, sessionId }
  await owner.person.must('sessions.call-off', { params, body: { reason: 'Fog' } })

  const { priceMinor } = given
  const golfer = await signUp(world)
  const { person } = golfer
  const { clinics } = await person.must('page.read', { params: { academy: slug } })
  expect(clinics).toMatchObject([{ runPriceMinor: priceMinor }])
  const one = { params: { academy: slug, clinic: clinic.slug } }
  expect((await person.must('page.clinic', one)).clinic.runPriceMinor).toBe(priceMinor)
  expect((await takePlace(golfer, academy, { clinic })).totalMinor).toBe(priceMinor)
})
