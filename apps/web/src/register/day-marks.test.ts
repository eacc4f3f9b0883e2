import { describe, expect, it } from 'vitest'
import { markOf, withMark, withoutMark } from './day-marks'
import type { Day, RegisterRow, SetMark } from './queries'

/** A day with one register; only its rows' places and marks are looked at. */
function dayWith(marks: Record<string, SetMark | null>): Day {
  const rows = Object.entries(marks).map(([placeId, mark]) => ({ placeId, mark }) as RegisterRow)
  return { registers: [{ rows }] } as Day
}

const marksOf = (day: Day) => ({ wren: markOf(day, 'wren'), finn: markOf(day, 'finn') })

describe('a mark that is refused', () => {
  it('goes off its own row, and what was marked meanwhile stays', () => {
    const before = dayWith({ wren: 'late', finn: null })
    const wren = { placeId: 'wren', mark: 'present', before: 'late' } as const
    const both = withMark(withMark(before, wren), { placeId: 'finn', mark: 'absent' })
    expect(marksOf(both)).toEqual({ wren: 'present', finn: 'absent' })
    expect(marksOf(withoutMark(both, wren))).toEqual({ wren: 'late', finn: 'absent' })
  })

  it('does not undo a later press on the same row', () => {
    const refused = { placeId: 'wren', mark: 'present', before: null } as const
    const later = dayWith({ wren: 'excused', finn: null })
    expect(marksOf(withoutMark(later, refused))).toEqual({ wren: 'excused', finn: null })
  })
})
