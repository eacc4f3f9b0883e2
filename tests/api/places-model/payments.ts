import { expect } from 'vitest'
import { golferOf, pickEnrolment, step, wentWell, type Step } from './commands'
import type { Scene } from './scene'
import { takeStock } from './stock'

interface Pick {
  who: number
  pick: number
}

export const GOOD_CARD = '4242424242424242'
export const DECLINED_CARD = '4000000000000002'

/** How the provider's word of a payment comes: at once, twice, or when it is let through. */
export type Delivery = 'now' | 'twice' | 'late'

/** Opens the provider's page; when its answer is lost the page is there, and nobody knows of it. */
export const openPage = ({ who, pick, isLost }: Pick & { isLost: boolean }): Step =>
  step(`golfer ${who} opens the page${isLost ? ', whose address is lost' : ''}`, async (scene) => {
    const found = await pickEnrolment(scene, { who, state: 'held', pick })
    if (!found) return
    const { payments } = scene.world
    const before = Object.keys(payments.state.checkouts).length
    if (isLost) payments.loseNextAnswers(1)
    const params = { ...scene.params, enrolmentId: found.enrolment.id }
    const reply = await found.golfer.person.call('checkout.start', { params })
    const isMade = Object.keys(payments.state.checkouts).length > before
    if (isLost && isMade) return expect(reply.problem?.code).toBe('provider-unavailable')
    // Nothing was asked of the provider, so that nothing was lost.
    if (isLost) payments.loseNextAnswers(-1)
    if (!wentWell('checkout.start', reply)) return
    const id = new URL(reply.answer.url).pathname.split('/').at(-1) ?? ''
    expect(payments.state.checkouts[id]?.status, 'the page can be paid on').toBe('open')
  })

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

export const atDesk = ({ who, pick }: Pick): Step =>
  step(`golfer ${who} promises to pay at the desk`, async (scene, { deskMinor }) => {
    const found = await pickEnrolment(scene, { who, state: 'held', pick })
    if (!found) return
    const enrolmentId = found.enrolment.id
    const params = { ...scene.params, enrolmentId }
    const reply = await found.golfer.person.call('checkout.at-desk', { params })
    if (!wentWell('checkout.at-desk', reply)) return
    // What was called off while it was held is not owed.
    const { places } = await takeStock(scene)
    const on = places.filter((row) => row.enrolmentId === enrolmentId && row.state === 'confirmed')
    const owedMinor = on.reduce((sum, { netMinor, taxMinor }) => sum + netMinor + taxMinor, 0)
    deskMinor.set(enrolmentId, owedMinor)
  })

/** Cash over the desk: all that is owed, a part of it, or a little more than that. */
export const takeCash = ({ pick, share }: { pick: number; share: 0.5 | 1 | 1.5 }): Step =>
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

export const payNow = ({ who, pick }: Pick): Step =>
  step(`golfer ${who} pays`, async (scene) => {
    const found = await pickEnrolment(scene, { who, state: 'held', pick })
    if (!found) return
    const params = { ...scene.params, enrolmentId: found.enrolment.id }
    const reply = await golferOf(scene, who).person.call('checkout.start', { params })
    if (!wentWell('checkout.start', reply)) return
    const id = new URL(reply.answer.url).pathname.split('/').at(-1) ?? ''
    expect(scene.world.payments.pay(id, GOOD_CARD)).toBeNull()
  })
