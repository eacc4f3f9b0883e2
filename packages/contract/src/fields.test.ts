import { describe, expect, it } from 'vitest'
import { isSlug, line } from './fields'

describe('a line of text', () => {
  it.each([
    'Wedges to a number',
    'Ní Dhomhnaill, Aoife',
    '小林 美咲',
    'می‌خواهم', // Written with a zero-width non-joiner, as Persian is.
    'Putting ⛳',
    '👨‍👩‍👧 morning', // An emoji of several, joined.
  ])('takes %j', (text) => {
    expect(line(40).safeParse(text).success).toBe(true)
  })

  it.each([
    ['nothing', ''],
    ['spaces', '   '],
    ['joiners alone', '\u200d\u200d'],
    ['a line feed', 'To: a\r\nBcc: b'],
    ['a NUL', 'a\u0000b'],
    ['a zero-width space', 'Wed\u200bges'],
    ['a reversal', 'Wedges \u202egnp.exe'],
    ['an isolate', '\u2067Wedges'],
    ['half a pair', 'a\ud800'],
    ['too many', 'a'.repeat(41)],
  ])('refuses %s', (_what, text) => {
    expect(line(40).safeParse(text).success).toBe(false)
  })
})

it.each([
  ['kittiwake-links', true],
  ['links-2', true],
  ['-links', false],
  ['links--2', false],
  ['Links', false],
  ["links'", false],
  ['links\n', false],
])('knows whether %j can be an address', (text, isOne) => {
  expect(isSlug(text)).toBe(isOne)
})
