import { expect, it } from 'vitest'
import { forgetLinkSecret, takeLinkSecret } from './link-secret'

function tab() {
  const kept = new Map<string, string>()
  return {
    getItem: (key: string) => kept.get(key) ?? null,
    setItem: (key: string, value: string) => void kept.set(key, value),
    removeItem: (key: string) => void kept.delete(key),
  }
}

it('is there again when the page is come back to without it', () => {
  const kept = tab()
  expect(takeLinkSecret('verify', { hash: '#a-secret', kept })).toBe('a-secret')
  expect(takeLinkSecret('verify', { hash: '', kept })).toBe('a-secret')
})

it('gives way to that of a newer link, and to none of another page', () => {
  const kept = tab()
  takeLinkSecret('verify', { hash: '#old', kept })
  expect(takeLinkSecret('verify', { hash: '#new', kept })).toBe('new')
  expect(takeLinkSecret('invitation', { hash: '', kept })).toBe('')
})

it('is gone once it was used', () => {
  const kept = tab()
  takeLinkSecret('verify', { hash: '#a-secret', kept })
  forgetLinkSecret('verify', kept)
  expect(takeLinkSecret('verify', { hash: '', kept })).toBe('')
})
