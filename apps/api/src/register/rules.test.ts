import { describe, expect, it } from 'vitest'
import { isLastPress, noteOf, refusalToClose, refusalToMark } from './rules'

const BEGINS = new Date('2031-04-01T17:00:00.000Z')
const from = (ms: number) => new Date(BEGINS.getTime() + ms)
const HOUR_MS = 3_600_000
const session = { state: 'planned', registerState: 'open', startsAt: BEGINS }

describe('a mark', () => {
  it.each([
    { when: 'a millisecond too early', change: {}, now: from(-HOUR_MS - 1), refusal: 'too-early' },
    { when: 'an hour before', change: {}, now: from(-HOUR_MS), refusal: null },
    { when: 'days later', change: {}, now: from(99 * HOUR_MS), refusal: null },
    { when: 'once closed', change: { registerState: 'closed' }, now: BEGINS, refusal: 'closed' },
    { when: 'called off', change: { state: 'called-off' }, now: BEGINS, refusal: 'called-off' },
  ])('is refused $when by $refusal', ({ change, now, refusal }) => {
    expect(refusalToMark({ ...session, ...change }, now)).toBe(refusal)
  })
})

describe('a register', () => {
  it.each([
    { when: 'a millisecond before it begins', now: from(-1), unmarked: 0, refusal: 'too-early' },
    { when: 'as it begins', now: BEGINS, unmarked: 0, refusal: null },
    { when: 'with somebody unmarked', now: from(HOUR_MS), unmarked: 1, refusal: 'unmarked' },
  ])('is not closed $when by $refusal', ({ now, unmarked, refusal }) => {
    expect(refusalToClose(session, { unmarked, now })).toBe(refusal)
  })

  it('of a session that was called off is not closed', () => {
    const calledOff = { ...session, state: 'called-off' }
    expect(refusalToClose(calledOff, { unmarked: 0, now: BEGINS })).toBe('called-off')
  })
})

describe('a press', () => {
  it.each([
    { what: 'the first', pressedAt: from(0), before: null, isLast: true },
    { what: 'an older one', pressedAt: from(-1), before: from(0), isLast: false },
    { what: 'one of the same moment', pressedAt: from(0), before: from(0), isLast: true },
    { what: 'one without a time', pressedAt: null, before: from(9), isLast: true },
    { what: 'one from the future', pressedAt: from(HOUR_MS), before: from(11), isLast: false },
  ])('counts when it is $what: $isLast', ({ pressedAt, before, isLast }) => {
    expect(isLastPress({ pressedAt, now: from(10), before })).toBe(isLast)
  })
})

describe('a note', () => {
  const row = {
    notes: '',
    hand: 'right',
    lateBefore: 0,
    joinedAtNumber: 1,
    number: 3,
    sessionsTotal: 8,
  } as const
  it.each([
    { change: { notes: 'Asthma', lateBefore: 2 }, note: 'Asthma' },
    { change: { lateBefore: 1 }, note: 'Late once so far' },
    { change: { lateBefore: 3 }, note: 'Late 3 times so far' },
    { change: { hand: 'left' as const }, note: 'Left-handed' },
    { change: { joinedAtNumber: 2 }, note: 'Joined at session 2' },
    { change: {}, note: 'Session 3 of 8' },
    { change: { sessionsTotal: 1 }, note: '' },
  ])('says $note', ({ change, note }) => {
    expect(noteOf({ ...row, ...change })).toBe(note)
  })
})
