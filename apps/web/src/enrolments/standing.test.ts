import { describe, expect, it } from 'vitest'
import { standingAtDesk, standingOf } from './standing'

const place = {
  state: 'confirmed',
  isOffer: false,
  endedBecause: null,
  payment: 'paid',
  owedMinor: 0,
  totalMinor: 3_500,
} as const

describe('how a place stands', () => {
  it.each([
    [place, 'Yours', 'Paid'],
    [{ ...place, totalMinor: 0, payment: 'none' }, 'Yours', 'Has the place'],
    [
      { ...place, payment: 'at-desk', owedMinor: 3_500 },
      'Yours, to be paid at the desk',
      'To be paid at the desk',
    ],
    [{ ...place, payment: 'at-desk' }, 'Yours', 'Has the place'],
    [{ ...place, state: 'held' }, 'Held while you pay', 'Held for payment'],
    [{ ...place, state: 'held', isOffer: true }, 'Offered to you', 'Offered'],
    [{ ...place, state: 'cancelled', endedBecause: 'given-up' }, 'Given up', 'Given up'],
  ] as const)('%j', (given, toGolfer, toDesk) => {
    expect(standingOf(given)).toBe(toGolfer)
    expect(standingAtDesk(given)).toBe(toDesk)
  })
})
