import { expect, it } from 'vitest'
import { spanInWords } from './span-in-words'

it.each([
  { hours: 1, words: 'one hour' },
  { hours: 2, words: 'two hours' },
  { hours: 24, words: 'one day' },
  { hours: 36, words: '36 hours' },
  { hours: 7 * 24, words: 'seven days' },
  { hours: 30 * 24, words: '30 days' },
])('$hours hours are $words', ({ hours, words }) => {
  expect(spanInWords({ hours })).toBe(words)
})
