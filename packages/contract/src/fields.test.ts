import { describe, expect, it } from 'vitest'
import { isSlug, line, localDate, prose, zone } from './fields'

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
    ['a filler', '\u3164'],
    ['an empty pattern of dots', '\u2800'],
    ['tags', 'Ao\u{e0041}ife'],
    ['too many', 'a'.repeat(41)],
  ])('refuses %s', (_what, text) => {
    expect(line(40).safeParse(text).success).toBe(false)
  })
})

it.each([
  ['1900-01-01', true],
  ['2199-12-31', true],
  ['0000-01-01', false],
  ['2200-01-01', false],
  ['9999-12-31', false],
  ['2031-02-31', false],
])('takes %s for a day: %j', (day, isOne) => {
  expect(localDate.safeParse(day).success).toBe(isOne)
})

it.each([
  ['Europe/Dublin', true],
  ['America/Denver', true],
  ['europe/dublin', false],
  ['Nowhere/Here', false],
])('takes %s for a zone: %j', (name, isOne) => {
  expect(zone.safeParse(name).success).toBe(isOne)
})

it('lets no text turn around, or hide', () => {
  expect(prose(80).safeParse('\u202eevil').success).toBe(false)
  expect(prose(80).safeParse('Two lines\nof text').success).toBe(true)
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
