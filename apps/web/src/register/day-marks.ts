import type { Day, SetMark } from './queries'

/** One press on a golfer's row, and what stood there before it. */
export interface DrawnMark {
  placeId: string
  mark: SetMark | null
  before: SetMark | null
}

export function withMark(day: Day, { placeId, mark }: Omit<DrawnMark, 'before'>): Day {
  return {
    ...day,
    registers: day.registers.map((register) => ({
      ...register,
      rows: register.rows.map((row) => (row.placeId === placeId ? { ...row, mark } : row)),
    })),
  }
}

export function markOf(day: Day, placeId: string): SetMark | null {
  const rows = day.registers.flatMap((register) => register.rows)
  return rows.find((row) => row.placeId === placeId)?.mark ?? null
}

/**
 * Takes one refused mark off its own row again. What was marked on other rows meanwhile stays, and
 * so does a later press on the same row.
 */
export function withoutMark(day: Day, { placeId, mark, before }: DrawnMark): Day {
  return markOf(day, placeId) === mark ? withMark(day, { placeId, mark: before }) : day
}
