import { setTimeout as pause } from 'node:timers/promises'

const TRIES = 6
const FIRST_PAUSE_MS = 150

/** How deliveries can be made to misbehave, as they do in life. */
export interface DeliveryControls {
  /** While muted nothing is sent, now or later. */
  mute: (isMuted: boolean) => void
  hold: () => void
  release: () => void
  /** Delivers what is held in the reverse order. */
  releaseReversed: () => void
  duplicateNext: (count: number) => void
  dropNext: (count: number) => void
  /** Resolves when nothing is on its way. */
  flush: () => Promise<void>
}

export interface Deliveries extends DeliveryControls {
  send: (payload: object) => void
  /** Gives up what is on its way. */
  stop: () => void
}

/** Delivers signed events, with retries, without keeping anybody waiting. */
export function makeDeliveries(options: {
  url: string | undefined
  /** The headers that prove a body; asked anew for each try, since they carry the time. */
  sign: (body: string) => Record<string, string>
}): Deliveries {
  const { url, sign } = options
  const onTheirWay = new Set<Promise<void>>()
  const stopping = new AbortController()
  let held: string[] = []
  let isHolding = false
  let isMuted = false
  let duplicates = 0
  let drops = 0

  const deliver = async (to: string, body: string): Promise<void> => {
    for (let attempt = 0; attempt < TRIES && !stopping.signal.aborted; attempt += 1) {
      if (await post(to, { body, headers: sign(body), signal: stopping.signal })) return
      const pauseMs = FIRST_PAUSE_MS * 2 ** attempt
      await pause(pauseMs, undefined, { signal: stopping.signal }).catch(() => {})
    }
  }
  const track = (delivery: Promise<void>) => {
    const tracked: Promise<void> = delivery.finally(() => onTheirWay.delete(tracked))
    onTheirWay.add(tracked)
  }
  const start = async (body: string): Promise<void> => {
    if (!url || isMuted) return
    if (drops > 0) {
      drops -= 1
      return
    }
    const times = duplicates > 0 ? 2 : 1
    if (duplicates > 0) duplicates -= 1
    await Promise.all(Array.from({ length: times }, () => deliver(url, body)))
  }
  const releaseAll = (bodies: string[]) => {
    isHolding = false
    held = []
    // One after the other, so that the order they leave in is the order they come in.
    const inTurn = async () => {
      for (const body of bodies) await start(body)
    }
    track(inTurn())
  }
  return {
    send(payload) {
      // Written out at once: a held event tells how things were, not how they are when released.
      const body = JSON.stringify(payload)
      if (isHolding) held.push(body)
      else track(start(body))
    },
    mute: (value) => void (isMuted = value),
    hold: () => void (isHolding = true),
    release: () => releaseAll(held),
    releaseReversed: () => releaseAll([...held].reverse()),
    duplicateNext: (count) => void (duplicates += count),
    dropNext: (count) => void (drops += count),
    async flush() {
      while (onTheirWay.size > 0) await Promise.all(onTheirWay)
    },
    stop: () => stopping.abort(),
  }
}

/** Whether the receiver thanked for it with a 2xx. */
async function post(
  url: string,
  given: { body: string; headers: Record<string, string>; signal: AbortSignal },
): Promise<boolean> {
  try {
    const response = await fetch(url, {
      method: 'POST',
      headers: { 'content-type': 'application/json', ...given.headers },
      body: given.body,
      signal: given.signal,
      redirect: 'manual',
    })
    await response.arrayBuffer()
    return response.ok
  } catch {
    return false
  }
}
