import { expect, it } from 'vitest'
import { endedInWords } from './ended-words'

it.each([
  ['lapsed', 'none', /ran out.* Nothing was taken\.$/],
  ['lapsed', 'declined', /Nothing was taken\.$/],
  ['lapsed', 'paid', /Your payment came after that; all of it is given back\.$/],
  ['let-go', 'paid', /given back\.$/],
  ['let-go', 'none', /^You let this place go\. Nothing was taken\.$/],
  ['given-up', 'paid', /^This place was given up\.$/],
  ['called-off', 'paid', /were called off\.$/],
] as const)('a place that ended as %s with payment %s', (endedBecause, payment, words) => {
  expect(endedInWords({ endedBecause, payment })).toMatch(words)
})
