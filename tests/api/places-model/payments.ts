import { expect } from 'vitest'
import { pickEnrolment, step, wentWell, type Step } from './commands'
import type { Scene } from './scene'
import { takeStock } from './stock'

export const GOOD_CARD = '4242424242424242'
export const DECLINED_CARD = '4000000000000002'

/** How the provider's word of a payment comes: at once, twice, or when it is let through. */
export type Delivery = 'now' | 'twice' | 'late'

/**
 * Opens the provider's page. It is forgotten when the process stops between the provider's answer
 * and its own writing: the page is there, and can be paid on, but nobody here knows of it.
 */
export const openPage = ({ pick, isForgotten }: { pick: number; isForgotten: boolean }): Step =>
  step(
    `the page of hold ${pick} is opened${isForgotten ? ' and forgotten' : ''}`,
    async (scene) => {
      const found = await pickEnrolment(scene, { state: 'held', pick })
      if (!found) return
      const enrolmentId = found.enrolment.id
      const params = { ...scene.params, enrolmentId }
      const reply = await found.person.call('checkout.start', { params })
      if (!wentWell('checkout.start', reply)) return
      const page = scene.world.payments.state.checkouts[pageIn(reply.answer)]
      expect(page?.status, 'the page can be paid on').toBe('open')
      if (!isForgotten) return
      const { academyId } = scene
      await scene
        .db('orders')
        .where({ academyId, enrolmentId, state: 'open' })
        .update({ checkoutId: null, checkoutUrl: null })
    },
  )

const pageIn = ({ url }: { url: string }): string => new URL(url).pathname.split('/').at(-1) ?? ''

/** Somebody pays, or tries to, on any page that is open: the newest, a forgotten one, a lost one. */
export const payPage = ({
  pick,
  card,
  delivery,
}: {
  pick: number
  card: string
  delivery: Delivery
}): Step =>
  step(`page ${pick} is paid with ${card.slice(-4)}, told ${delivery}`, async (scene) => {
    const pages = openPages(scene)
    const page = pages[pick % Math.max(1, pages.length)]
    if (!page) return
    const { payments } = scene.world
    if (delivery === 'late') payments.hold()
    if (delivery === 'twice') payments.duplicateNext(1)
    payments.pay(page, card)
  })

function openPages({ world, account }: Scene): string[] {
  const nowSeconds = world.clock.now().getTime() / 1000
  return Object.values(world.payments.state.checkouts)
    .filter((page) => page.account === account && page.status === 'open')
    .filter((page) => page.expiresAt > nowSeconds)
    .map(({ id }) => id)
}

/** Lets through what was held back, in the order it happened or the other way round. */
export const deliver = ({ isReversed }: { isReversed: boolean }): Step =>
  step(`what was held back comes${isReversed ? ', the last first' : ''}`, async ({ world }) => {
    if (isReversed) world.payments.releaseReversed()
    else world.payments.release()
    await world.drain()
  })

export const atDesk = ({ pick }: { pick: number }): Step =>
  step(`hold ${pick} will be paid at the desk`, async (scene, { deskMinor }) => {
    const found = await pickEnrolment(scene, { state: 'held', pick })
    if (!found) return
    const enrolmentId = found.enrolment.id
    const params = { ...scene.params, enrolmentId }
    const reply = await found.person.call('checkout.at-desk', { params })
    if (!wentWell('checkout.at-desk', reply)) return
    // What was called off while it was held is not owed.
    const { places } = await takeStock(scene)
    const on = places.filter((row) => row.enrolmentId === enrolmentId && row.state === 'confirmed')
    const owedMinor = on.reduce((sum, { netMinor, taxMinor }) => sum + netMinor + taxMinor, 0)
    deskMinor.set(enrolmentId, owedMinor)
  })

/** Cash over the desk: all that is owed, a part of it, or a little more than that. */
export const takeCash = ({ pick, share }: { pick: number; share: number }): Step =>
  step(`${share} of what is owed is paid in cash`, async (scene, { deskMinor }) => {
    const owing = [...deskMinor]
    const [enrolmentId, owedMinor] = owing[pick % Math.max(1, owing.length)] ?? ['', 0]
    if (!enrolmentId) return
    const amountMinor = Math.max(1, Math.round(owedMinor * share))
    const params = { ...scene.params, enrolmentId }
    const body = { amountMinor }
    const reply = await scene.owner.person.call('checkout.take-cash', { params, body })
    if (amountMinor > owedMinor) return expect(reply.problem?.code).toBe('invalid-fields')
    expect(reply.status, reply.text).toBeLessThan(400)
    deskMinor.set(enrolmentId, owedMinor - amountMinor)
  })

export const passTime = ({ minutes }: { minutes: number }): Step =>
  step(`${minutes} minutes go by`, async ({ world }) => {
    world.clock.moveBy(minutes * 60_000)
    await world.sweep()
  })

export const payNow = ({ pick }: { pick: number }): Step =>
  step(`hold ${pick} is paid`, async (scene) => {
    const found = await pickEnrolment(scene, { state: 'held', pick })
    if (!found) return
    const params = { ...scene.params, enrolmentId: found.enrolment.id }
    const reply = await found.person.call('checkout.start', { params })
    if (!wentWell('checkout.start', reply)) return
    expect(scene.world.payments.pay(pageIn(reply.answer), GOOD_CARD)).toBeNull()
  })
