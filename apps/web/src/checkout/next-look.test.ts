import { expect, it } from 'vitest'
import { nextLookMs } from './next-look'

const heldUntil = '2031-03-06T12:41:00.000Z'
const held = { state: 'held', payment: 'none', heldUntil } as const
const at = (nowMs: number) => ({ isBack: false, nowMs })
const endMs = Date.parse(heldUntil)

it('looks again when the hold ends', () => {
  expect(nextLookMs(held, at(endMs - 600_000))).toBe(600_000)
})

it('goes on looking until the hold has been let go', () => {
  expect(nextLookMs(held, at(endMs))).toBe(3_000)
  expect(nextLookMs(held, at(endMs + 60_000))).toBe(3_000)
})

it('looks every second for word of a payment', () => {
  expect(nextLookMs(held, { isBack: true, nowMs: endMs - 600_000 })).toBe(1_000)
  expect(nextLookMs({ ...held, payment: 'open' }, at(endMs - 600_000))).toBe(1_000)
})

it('lets a place be that is held no longer', () => {
  expect(nextLookMs({ ...held, state: 'confirmed' }, at(endMs))).toBe(false)
  expect(nextLookMs(undefined, at(endMs))).toBe(false)
})
