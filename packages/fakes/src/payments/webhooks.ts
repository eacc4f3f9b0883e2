import { createHmac } from 'node:crypto'

const TRIES = 6
const FIRST_PAUSE_MS = 150

/** How deliveries can be made to misbehave, as they do in life. */
export interface DeliveryControls {
  mute(isMuted: boolean): void
  hold(): void
  release(): void
  duplicateNext(count: number): void
  dropNext(count: number): void
  /** Delivers what is held in the reverse order. */
  releaseReversed(): void
  /** Resolves when nothing is on its way. */
  flush(): Promise<void>
}

export interface Deliveries extends DeliveryControls {
  send(payload: object): void
}

/** Delivers signed events, with retries, without keeping anybody waiting. */
export function makeDeliveries(options: {
  url: string | undefined
  secret: string
  nowSeconds: () => number
}): Deliveries {
  const { url, secret, nowSeconds } = options
  const onTheirWay = new Set<Promise<void>>()
  let held: object[] = []
  let isHolding = false
  let isMuted = false
  let duplicates = 0
  let drops = 0

  const post = async (text: string): Promise<boolean> => {
    const t = nowSeconds()
    const v1 = createHmac('sha256', secret).update(`${t}.${text}`).digest('hex')
    try {
      const response = await fetch(url ?? '', {
        method: 'POST',
        headers: { 'content-type': 'application/json', 'stripe-signature': `t=${t},v1=${v1}` },
        body: text,
      })
      await response.arrayBuffer()
      return response.ok
    } catch {
      return false
    }
  }
  const deliver = async (payload: object): Promise<void> => {
    const text = JSON.stringify(payload)
    for (let attempt = 0; attempt < TRIES; attempt += 1) {
      if (await post(text)) return
      await new Promise((resolve) => setTimeout(resolve, FIRST_PAUSE_MS * 2 ** attempt))
    }
  }
  const start = (payload: object) => {
    if (!url || isMuted) return
    if (drops > 0) {
      drops -= 1
      return
    }
    const times = duplicates > 0 ? 2 : 1
    if (duplicates > 0) duplicates -= 1
    for (let time = 0; time < times; time += 1) {
      const delivery: Promise<void> = deliver(payload).finally(() => onTheirWay.delete(delivery))
      onTheirWay.add(delivery)
    }
  }
  const releaseAll = (payloads: object[]) => {
    isHolding = false
    held = []
    payloads.forEach(start)
  }
  return {
    send: (payload) => (isHolding ? void held.push(payload) : start(payload)),
    mute: (value) => (isMuted = value),
    hold: () => (isHolding = true),
    release: () => releaseAll(held),
    releaseReversed: () => releaseAll([...held].reverse()),
    duplicateNext: (count) => (duplicates += count),
    dropNext: (count) => (drops += count),
    async flush() {
      while (onTheirWay.size > 0) await Promise.all(onTheirWay)
    },
  }
}
