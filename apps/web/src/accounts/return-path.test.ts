import { expect, it } from 'vitest'
import { returnPath } from './return-path'

const HERE = 'https://marram.example'

it.each([
  ['/kittiwake-links/my', '/kittiwake-links/my'],
  ['/verify#secret', '/verify#secret'],
  ['/kittiwake-links?level=any', '/kittiwake-links?level=any'],
])('goes back to %s', (to, path) => {
  expect(returnPath(to, HERE)).toBe(path)
})

it.each([
  null,
  '',
  'https://elsewhere.example/',
  'javascript:alert(1)',
  '//elsewhere.example/',
  '/\\elsewhere.example/',
  '/\t/elsewhere.example/',
  '//',
])('stays here for %j', (to) => {
  expect(returnPath(to, HERE)).toBeNull()
})
