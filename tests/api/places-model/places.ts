import {
  step,
  enrolmentsOf,
  golferOf,
  pickEnrolment,
  sessionOf,
  wentWell,
  type Step,
} from './commands'
import { backOf, forgive } from './remembered'
import { takeStock } from './stock'
import { expect } from 'vitest'

/** Takes a place in a session, or with -1 in the whole run. */
export const hold = ({ who, at }: { who: number; at: number }): Step =>
  step(`golfer ${who} takes ${at < 0 ? 'the run' : `session ${at}`}`, async (scene) => {
    const { params, clinic } = scene
    const body = {
      clinicId: clinic.id,
      ...sessionOf(scene, at),
      for: { kind: 'me' },
      hasAcceptedWaiver: true,
    } as const
    const { person } = golferOf(scene, who)
    wentWell('enrolments.hold', await person.call('enrolments.hold', { params, body }))
  })

export const wait = ({ who, at }: { who: number; at: number }): Step =>
  step(`golfer ${who} waits for ${at < 0 ? 'the run' : `session ${at}`}`, async (scene) => {
    const { params, clinic } = scene
    const golfer = golferOf(scene, who)
    const golferId = (await enrolmentsOf(scene, golfer))[0]?.golfer.id
    if (!golferId) return
    const body = { clinicId: clinic.id, ...sessionOf(scene, at), golferId }
    wentWell('waitlist.join', await golfer.person.call('waitlist.join', { params, body }))
  })

export const letGo = ({ pick }: { pick: number }): Step =>
  step(`hold ${pick} is let go`, async (scene) => {
    const found = await pickEnrolment(scene, { state: 'held', pick })
    if (!found) return
    const params = { ...scene.params, enrolmentId: found.enrolment.id }
    wentWell('enrolments.release', await found.person.call('enrolments.release', { params }))
  })

/** Gives a confirmed place up, for what the policy is worked out to give back. */
export const giveUp = ({ pick, isByStaff }: { pick: number; isByStaff: boolean }): Step =>
  step(`place ${pick} is given up${isByStaff ? ' by the desk' : ''}`, async (scene, remembered) => {
    const found = await pickEnrolment(scene, { state: 'confirmed', pick })
    if (!found) return
    const { id: enrolmentId, places } = found.enrolment
    const now = scene.world.clock.now().getTime()
    const { places: inStock } = await takeStock(scene)
    const ahead = places
      .filter(({ state, startsAt }) => state === 'confirmed' && Date.parse(startsAt) > now)
      .map(({ id, startsAt }) => {
        const row = inStock.find((place) => place.id === id)
        return { grossMinor: (row?.netMinor ?? 0) + (row?.taxMinor ?? 0), startsAt }
      })
    const params = { ...scene.params, enrolmentId }
    const person = isByStaff ? scene.owner.person : found.person
    const quote = isByStaff ? 'checkout.quote-giving-up-for' : 'checkout.quote-giving-up'
    const reply = await person.call(quote, { params })
    if (!wentWell(quote, reply)) return
    const backMinor = ahead.reduce(
      (sum, { grossMinor, startsAt }) => sum + backOf(grossMinor, Date.parse(startsAt) - now),
      0,
    )
    const refundMinor = forgive(remembered, { enrolmentId, amountMinor: backMinor })
    expect(reply.answer.refundMinor).toBe(refundMinor)
    const key = isByStaff ? 'checkout.give-up-for' : 'checkout.give-up'
    await person.must(key, { params, body: { refundMinor } })
    const grossMinor = ahead.reduce((sum, place) => sum + place.grossMinor, 0)
    remembered.keptMinor.set(enrolmentId, grossMinor - backMinor)
  })

export const callOff = ({ at }: { at: number }): Step =>
  step(`session ${at} is called off`, async (scene, remembered) => {
    const { sessionId = '' } = sessionOf(scene, at)
    const { places } = await takeStock(scene)
    const params = { ...scene.params, sessionId }
    const body = { reason: 'Lightning' }
    await scene.owner.person.must('sessions.call-off', { params, body })
    for (const { enrolmentId, ...place } of places) {
      if (place.sessionId !== sessionId || place.state !== 'confirmed') continue
      forgive(remembered, { enrolmentId, amountMinor: place.netMinor + place.taxMinor })
    }
  })

export const choose = ({ choice }: { choice: 'credit' | 'money' }): Step =>
  step(`what is owed is chosen as ${choice}`, async (scene) => {
    const { owed, places, enrolments } = await takeStock(scene)
    const place = places.find(({ id }) => owed.some(({ placeId }) => placeId === id))
    const enrolment = enrolments.find(({ id }) => id === place?.enrolmentId)
    const golfer = scene.golfers.find(({ account }) => account.id === enrolment?.takenBy)
    if (!place || !golfer) return
    const params = { ...scene.params, placeId: place.id }
    await golfer.person.must('checkout.choose', { params, body: { choice } })
  })
