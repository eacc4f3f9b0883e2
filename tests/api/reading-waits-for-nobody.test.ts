import { expect, it } from 'vitest'
import { openAcademy, signUp, takePlace } from '../support/builders'
import { watchMeanwhile } from '../support/meanwhile'
import { useWorld } from '../support/use-world'

const world = await useWorld()

it('reads an enrolment and a register while somebody changes them', async () => {
  const academy = await openAcademy(world)
  const params = { academy: academy.slug }
  const golfer = await signUp(world)
  const { id: enrolmentId } = await takePlace(golfer, academy, { clinic: academy.clinic })
  const sessionId = academy.clinic.sessions[0]!.id

  const enrolment = await watchMeanwhile(
    world,
    (trx) => trx('enrolments').where({ id: enrolmentId }).forUpdate(),
    () => golfer.person.call('enrolments.read', { params: { ...params, enrolmentId } }),
  )
  const register = await watchMeanwhile(
    world,
    (trx) => trx('sessions').where({ id: sessionId }).forUpdate(),
    () => academy.owner.person.call('register.read', { params: { ...params, sessionId } }),
  )
  for (const { answer, hasWaited } of [enrolment, register]) {
    expect({ status: answer.status, hasWaited }).toEqual({ status: 200, hasWaited: false })
  }
})
