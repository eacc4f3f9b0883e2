import type { Request } from 'express'
import { ProviderError } from '../provider-error'
import type { FakeState } from '../state'

const KEPT_SECONDS = 24 * 3600

export interface Written {
  status: number
  body: string
  isReplayed: boolean
}

/**
 * Answers a change once: the same key and the same request get the same answer again for a day,
 * another request under it is refused, and so is one that comes while the first is at work. What
 * was refused before anything was done is not kept, so that it may be asked again, corrected.
 */
export function makeIdempotency(machine: { state: FakeState; now: () => number }) {
  const atWork = new Set<string>()
  return async (request: Request, act: () => Promise<string>): Promise<Written> => {
    const key = request.get('idempotency-key')
    if (!key) return { status: 200, body: await act(), isReplayed: false }
    const slot = `${request.get('stripe-account') ?? ''}:${key}`
    const asked = `${request.method} ${request.path} ${String(request.body)}`
    const { answers } = machine.state
    const had = answers[slot]
    if (had && machine.now() - had.at < KEPT_SECONDS) {
      if (had.asked !== asked) throw usedOtherwise()
      return { status: had.status, body: had.body, isReplayed: true }
    }
    if (atWork.has(slot)) throw inUse()
    atWork.add(slot)
    try {
      const body = await act()
      answers[slot] = { asked, at: machine.now(), status: 200, body }
      return { status: 200, body, isReplayed: false }
    } finally {
      atWork.delete(slot)
    }
  }
}

const usedOtherwise = () =>
  new ProviderError(
    400,
    'Keys for idempotent requests can only be used with the same parameters and the same address.',
    { type: 'idempotency_error' },
  )

const inUse = () =>
  new ProviderError(409, 'Another request with this idempotency key is still at work.', {
    type: 'idempotency_error',
    code: 'idempotency_key_in_use',
  })
