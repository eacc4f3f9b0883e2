import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { checkedReturnPath, isExpired, nextTryAt } from './rules'

const NOW = new Date('2031-04-01T18:00:00.000Z')
const secondsUntil = (at: Date | null) => (at ? (at.getTime() - NOW.getTime()) / 1_000 : null)

describe('after failures, the next try', () => {
  it.each([
    { failures: 0, seconds: null },
    { failures: 4, seconds: null },
    { failures: 5, seconds: 2 },
    { failures: 6, seconds: 4 },
    { failures: 13, seconds: 512 },
    { failures: 14, seconds: 900 },
    { failures: 5_000, seconds: 900 },
  ])('number $failures waits $seconds seconds', ({ failures, seconds }) => {
    expect(secondsUntil(nextTryAt(failures, NOW))).toBe(seconds)
  })

  it('never comes sooner after one more', () => {
    fc.assert(
      fc.property(fc.nat(2_000), (failures) => {
        const wait = secondsUntil(nextTryAt(failures, NOW)) ?? 0
        const next = secondsUntil(nextTryAt(failures + 1, NOW)) ?? 0
        expect(next).toBeGreaterThanOrEqual(wait)
      }),
    )
  })
})

describe('a link', () => {
  it.each([
    { when: 'a millisecond before its end', ms: -1, is: false },
    { when: 'at its end', ms: 0, is: false },
    { when: 'a millisecond after', ms: 1, is: true },
  ])('has expired $when: $is', ({ ms, is }) => {
    expect(isExpired(NOW, new Date(NOW.getTime() + ms))).toBe(is)
  })
})

describe('the way back after signing in', () => {
  it.each([
    { path: '/kittiwake/my?from=mail#places', back: '/kittiwake/my?from=mail#places' },
    { path: '//elsewhere.example', back: '/' },
    { path: '/\\elsewhere.example', back: '/' },
    { path: 'https://elsewhere.example', back: '/' },
    { path: `/${'a'.repeat(300)}`, back: '/' },
    { path: undefined, back: '/' },
  ])('of $path is $back', ({ path, back }) => {
    expect(checkedReturnPath(path)).toBe(back)
  })
})
