/** Tells the time. Passed in everywhere, so that tests can move it; only this file reads the real one. */
export interface Clock {
  now(): Date
}

export const systemClock: Clock = { now: () => new Date(Date.now()) }

export interface MovableClock extends Clock {
  moveTo(instant: Date): void
  moveBy(milliseconds: number): void
}

/** A clock for tests and for the demo's history: it stands still until it is moved. */
export function makeMovableClock(start: Date): MovableClock {
  let current = start.getTime()
  return {
    now: () => new Date(current),
    moveTo: (instant) => (current = instant.getTime()),
    moveBy: (milliseconds) => (current += milliseconds),
  }
}
