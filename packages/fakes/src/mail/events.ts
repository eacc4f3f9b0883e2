import type { Fate } from './message'

/** Addresses that get no mail in life either, by what stands before the @. */
const SENTINELS: Readonly<Record<string, Fate>> = {
  bounce: 'bounce',
  drop: 'dropped',
  spam: 'spamreport',
}

/** Addresses that nothing is sent to any more, and why. */
export type Suppressed = Record<string, 'Bounced Address' | 'Spam Reporting Address'>

/** What becomes of a message to an address, which may keep later ones from it. */
export function meetFate(suppressed: Suppressed, email: string): { fate: Fate; reason: string } {
  const address = email.toLowerCase()
  const earlier = suppressed[address]
  if (earlier) return { fate: 'dropped', reason: earlier }
  const fate = SENTINELS[address.split('@')[0] ?? ''] ?? 'delivered'
  if (fate === 'bounce') suppressed[address] = 'Bounced Address'
  if (fate === 'spamreport') suppressed[address] = 'Spam Reporting Address'
  return { fate, reason: fate === 'dropped' ? 'Invalid' : '' }
}

export type MailEventName = Fate | 'processed'

export interface MailEvent {
  sg_event_id: string
  sg_message_id: string
  event: MailEventName
  email: string
  timestamp: number
  [detail: string]: string | number
}

/** What the event webhook tells of a message, in the order it happens in. */
export function eventsOf(given: {
  id: string
  email: string
  fate: Fate
  reason: string
  timestamp: number
}): MailEvent[] {
  const { id, email, fate, reason, timestamp } = given
  const tell = (event: MailEvent['event'], details: Record<string, string> = {}): MailEvent => ({
    sg_event_id: `${event}-${id}`,
    sg_message_id: `${id}.recvd-stand-in`,
    'smtp-id': `<${id}@stand-in>`,
    event,
    email,
    timestamp,
    ...details,
  })
  if (fate === 'dropped') return [tell('dropped', { reason })]
  const processed = tell('processed')
  if (fate === 'bounce') {
    const details = {
      type: 'bounce',
      status: '5.1.1',
      reason: '550 5.1.1 There is no such mailbox',
    }
    return [processed, tell('bounce', details)]
  }
  const delivered = tell('delivered', { response: '250 OK' })
  return fate === 'spamreport' ? [processed, delivered, tell('spamreport')] : [processed, delivered]
}
