import { describe, expect, it } from 'vitest'
import { openAcademy, signUp, takePlace } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

/** An academy that was taken off the page, and a golfer who kept a clinic's number. */
async function withdrawn() {
  const academy = await openAcademy(world)
  const params = { academy: academy.slug }
  const golfer = await signUp(world)
  const before = await takePlace(golfer, academy, { clinic: academy.clinic })
  await academy.owner.person.must('academies.publish', { params, body: { isPublished: false } })
  return { academy, params, before }
}

describe('an academy that is not open', () => {
  it('sells nothing to those who know a clinic’s number', async () => {
    const { academy, params } = await withdrawn()
    const stranger = await signUp(world)
    const { problem } = await stranger.person.call('enrolments.hold', {
      params,
      body: { clinicId: academy.clinic.id, for: { kind: 'me' }, hasAcceptedWaiver: true },
    })
    expect(problem).toMatchObject({ code: 'not-on-sale', detail: 'This academy is not open yet.' })
  })

  it('still gives places by its own staff', async () => {
    const { academy, params, before } = await withdrawn()
    const { id: golferId } = await academy.owner.person.must('golfers.enter', {
      params,
      body: { name: 'Nora Keane' },
    })
    const given = await academy.owner.person.must('enrolments.give', {
      params,
      body: { clinicId: academy.clinic.id, golferId, isException: false },
    })
    expect(given.state).toBe('confirmed')
    expect(given.id).not.toBe(before.id)
  })
})
