import { describe, expect, it, vi } from 'vitest'
import { together } from './together'

const asked = (error: Error | null, isLoadingError = error !== null) => ({
  error,
  isLoadingError,
  refetch: vi.fn(() => Promise.resolve()),
})

describe('questions asked together', () => {
  it('have the first refusal, and ask again only what was refused', () => {
    const [first, second, third] = [asked(null), asked(new Error('two')), asked(new Error('three'))]
    const { error, retry } = together(first, second, third)
    expect(error?.message).toBe('two')
    retry()
    expect(first.refetch).not.toHaveBeenCalled()
    expect(second.refetch).toHaveBeenCalledOnce()
    expect(third.refetch).toHaveBeenCalledOnce()
  })

  it('keep an answer that could not be asked anew', () => {
    const { error, retry } = together(asked(new Error('the line broke'), false))
    expect(error).toBeNull()
    expect(retry).not.toThrow()
  })
})
