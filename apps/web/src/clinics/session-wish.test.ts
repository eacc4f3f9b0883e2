import { describe, expect, it } from 'vitest'
import type { Session } from './queries'
import { changeOf, wishOf } from './session-wish'

const DENVER = 'America/Denver'

/** A session with a second coach and a second area; only what a change looks at. */
const session = {
  startsAt: '2026-09-18T00:00:00.000Z',
  endsAt: '2026-09-18T01:15:00.000Z',
  capacity: 6,
  coaches: [{ id: 'fintan' }, { id: 'orla' }],
  areas: [
    { id: 'bays', fromUnit: 1, toUnit: 6 },
    { id: 'green', fromUnit: 1, toUnit: 1 },
  ],
} as Session

const TIMES = {
  startsOnLocal: '2026-09-17',
  startsAtLocal: '18:00',
  durationMinutes: 75,
  capacity: 6,
}

describe('a session that is changed', () => {
  it('stands in the fields as the venue’s clock has it', () => {
    expect(wishOf(session, DENVER)).toMatchObject({
      ...TIMES,
      durationMinutes: '75',
      capacity: '6',
    })
  })

  it('sends neither coaches nor areas where they are the same', () => {
    expect(changeOf(wishOf(session, DENVER), session)).toEqual(TIMES)
  })

  it('keeps its other coach and its other area when the first is another', () => {
    const wish = { ...wishOf(session, DENVER), coachId: 'sal', toUnit: '4' }
    expect(changeOf(wish, session)).toEqual({
      ...TIMES,
      coachIds: ['sal', 'orla'],
      areas: [
        { areaId: 'bays', fromUnit: 1, toUnit: 4 },
        { areaId: 'green', fromUnit: 1, toUnit: 1 },
      ],
    })
  })
})
