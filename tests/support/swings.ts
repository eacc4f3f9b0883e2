import type { Answer, Sent } from '@marram/contract'

export type SwingView = Answer<'swings.read'>
export type NewSwing = Sent<'swings.record', 'body'>

type Angles = NewSwing['wrist']['address']

/** A lead wrist as coaches say it, in degrees: extension, and towards the little finger. */
export const wrist = (extensionDeg: number, ulnarDeg: number): Angles => ({
  flexionDeg: -extensionDeg,
  ulnarDeg,
})

/** A swing with a seven-iron that holds its extension to impact, read by a sensor. */
export function swingFields(change: Partial<NewSwing> = {}): NewSwing {
  return {
    club: '7-iron',
    method: 'sensor',
    wrist: { address: wrist(28, 5), top: wrist(44, -15), impact: wrist(18, -5) },
    ball: { start: 'pulled', curve: 'slice', height: 'high', contact: 'fat', distanceMetres: 112 },
    ...change,
  }
}
