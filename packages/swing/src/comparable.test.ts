import { describe, expect, it } from 'vitest'
import { areComparable, matchUpOf, type WristTrack } from './comparable'
import type { WristAngles } from './wrist'

const at = (flexionDeg: number, ulnarDeg: number): WristAngles => ({ flexionDeg, ulnarDeg })
const startingAt = (address: WristAngles): WristTrack => ({
  address,
  top: at(0, 0),
  impact: at(0, 0),
})

describe('two swings compare', () => {
  it.each([
    { what: 'as they start alike', other: at(-28, 5), isOne: true },
    { what: 'at the tolerance of one axis', other: at(-31, 5), isOne: true },
    { what: 'at the tolerance of the other', other: at(-28, 2), isOne: true },
    { what: 'not a tenth beyond it', other: at(-31.1, 5), isOne: false },
    { what: 'not a tenth beyond it sideways', other: at(-28, 8.1), isOne: false },
  ])('$what: $isOne', ({ other, isOne }) => {
    const [one, next] = [startingAt(at(-28, 5)), startingAt(other)]
    expect(areComparable({ one, other: next, toleranceDeg: 3 })).toBe(isOne)
    expect(areComparable({ one: next, other: one, toleranceDeg: 3 })).toBe(isOne)
  })

  it('at the tolerance, wherever the tenths lie', () => {
    for (let tenth = -500; tenth <= 500; tenth += 1) {
      const one = startingAt(at(tenth / 10, 0))
      const other = startingAt(at((tenth + 30) / 10, 0))
      expect(areComparable({ one, other, toleranceDeg: 3 })).toBe(true)
    }
  })
})

describe('a match-up', () => {
  const down = (top: WristAngles, impact: WristAngles) =>
    matchUpOf({ address: at(0, 0), top, impact }, { extensionOutDeg: 20, radialBackDeg: 15 })

  it.each([
    { top: at(-30, -15), impact: at(-10, 0), isExtensionOut: true, isRadialBack: true },
    { top: at(-30, -15), impact: at(-10.1, 0), isExtensionOut: false, isRadialBack: true },
    { top: at(-30, -15), impact: at(-10, -0.1), isExtensionOut: true, isRadialBack: false },
    { top: at(-10, 5), impact: at(-30, -10), isExtensionOut: false, isRadialBack: false },
  ])('from $top to $impact', ({ top, impact, ...halves }) => {
    expect(down(top, impact)).toMatchObject(halves)
  })

  it('is whole at its thresholds, wherever the tenths lie', () => {
    for (let tenth = -500; tenth <= 300; tenth += 1) {
      const halves = down(at(tenth / 10, -15), at((tenth + 200) / 10, 0))
      expect(halves.isExtensionOut).toBe(true)
    }
  })
})
