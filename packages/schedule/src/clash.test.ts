import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { findClashes, findClashesBetween, type Clash, type TakenTime } from './clash'

const minute = (minutes: number) => new Date(Date.UTC(2026, 9, 6, 17) + minutes * 60_000)

function session(
  id: string,
  from: number,
  to: number,
  changes: Partial<TakenTime> = {},
): TakenTime {
  return {
    id,
    startsAt: minute(from),
    endsAt: minute(to),
    isCalledOff: false,
    coachIds: [],
    areas: [],
    ...changes,
  }
}

const bays = (fromUnit: number, toUnit: number) => [{ areaId: 'range', fromUnit, toUnit }]

describe('findClashes', () => {
  it('names the coach two sessions want, and when', () => {
    const first = session('a', 0, 60, { coachIds: ['aoife', 'donal'] })
    const second = session('b', 45, 90, { coachIds: ['aoife'] })
    expect(findClashes([second, first])).toEqual([
      {
        kind: 'coach',
        coachId: 'aoife',
        firstId: 'a',
        secondId: 'b',
        from: minute(45),
        to: minute(60),
      },
    ])
  })

  it('names the units two sessions want, and lets two groups share a range', () => {
    const first = session('a', 0, 60, { areas: bays(1, 6) })
    expect(findClashes([first, session('b', 0, 60, { areas: bays(5, 9) })])).toMatchObject([
      { kind: 'area', areaId: 'range', fromUnit: 5, toUnit: 6 },
    ])
    expect(findClashes([first, session('b', 0, 60, { areas: bays(6, 6) })]).length).toBe(1)
    expect(findClashes([first, session('b', 0, 60, { areas: bays(7, 12) })])).toEqual([])
    const elsewhere = [{ areaId: 'studio', fromUnit: 1, toUnit: 6 }]
    expect(findClashes([first, session('b', 0, 60, { areas: elsewhere })])).toEqual([])
  })

  it('finds none where one ends as the other begins', () => {
    const coachIds = ['aoife']
    const first = session('a', 0, 60, { coachIds })
    expect(findClashes([first, session('b', 60, 90, { coachIds })])).toEqual([])
    expect(findClashes([first, session('b', 59, 90, { coachIds })]).length).toBe(1)
  })

  it('ignores sessions called off', () => {
    const first = session('a', 0, 60, { coachIds: ['aoife'] })
    const second = session('b', 0, 60, { coachIds: ['aoife'], isCalledOff: true })
    expect(findClashes([first, second])).toEqual([])
  })

  it('finds the long one behind the short ones', () => {
    const coachIds = ['aoife']
    const all = [
      session('long', 0, 300, { coachIds }),
      session('short', 10, 20, { coachIds }),
      session('late', 200, 260, { coachIds }),
    ]
    expect(findClashes(all).map(({ secondId }) => secondId)).toEqual(['short', 'late'])
  })

  it('finds what comparing every pair finds', () => {
    const taken = fc.record({
      from: fc.nat(40),
      length: fc.nat(20),
      isCalledOff: fc.boolean(),
      coachIds: fc.uniqueArray(fc.constantFrom('p', 'q', 'r'), { maxLength: 2 }),
      areas: fc.array(
        fc.record({ areaId: fc.constantFrom('x', 'y'), first: fc.nat(6), more: fc.nat(3) }),
        { maxLength: 2 },
      ),
    })
    fc.assert(
      fc.property(fc.array(taken, { maxLength: 14 }), (all) => {
        const sessions = all.map(({ from, length, areas, ...rest }, index) =>
          session(`s${index}`, from, from + length, {
            ...rest,
            areas: areas.map(({ areaId, first, more }) => ({
              areaId,
              fromUnit: first + 1,
              toUnit: first + 1 + more,
            })),
          }),
        )
        expect(findClashes(sessions).map(name).sort()).toEqual(bruteForce(sessions).sort())
        const [planned, existing] = [sessions.slice(0, 5), sessions.slice(3)]
        const between = findClashesBetween({ planned, existing }).map(name).sort()
        const isPlanned = (id: string) => planned.some((one) => one.id === id)
        const expected = bruteForce(sessions).filter((text) => {
          const [one = '', other = ''] = text.split(' ')
          return isPlanned(one) !== isPlanned(other)
        })
        expect(between).toEqual(expected.sort())
      }),
      { numRuns: 300 },
    )
  })
})

describe('findClashesBetween', () => {
  it('holds the plan against the rest, not against what it replaces', () => {
    const coachIds = ['aoife']
    const planned = [session('a', 30, 90, { coachIds }), session('new', 60, 120, { coachIds })]
    const existing = [
      session('a', 0, 60, { coachIds }),
      session('b', 80, 100, { coachIds }),
      session('c', 80, 100, { coachIds }),
    ]
    const pairs = findClashesBetween({ planned, existing }).map(({ firstId, secondId }) =>
      [firstId, secondId].join(' '),
    )
    expect(pairs).toEqual(['a b', 'new b', 'a c', 'new c'])
  })
})

function name(clash: Clash): string {
  const ids = [clash.firstId, clash.secondId].sort()
  const what =
    clash.kind === 'coach' ? clash.coachId : [clash.areaId, clash.fromUnit, clash.toUnit].join('/')
  return [...ids, what, clash.from.toISOString(), clash.to.toISOString()].join(' ')
}

/** Every pair, minute by minute and unit by unit: slow, and too simple to be wrong. */
function bruteForce(sessions: readonly TakenTime[]): string[] {
  const minutesOf = ({ startsAt, endsAt }: TakenTime) =>
    Array.from({ length: 70 }, (_, at) => minute(at)).filter((at) => startsAt <= at && at < endsAt)
  const unitsOf = ({ fromUnit, toUnit }: { fromUnit: number; toUnit: number }) =>
    Array.from({ length: 12 }, (_, unit) => unit).filter((u) => fromUnit <= u && u <= toUnit)
  return sessions.flatMap((one, index) =>
    sessions.slice(index + 1).flatMap((other) => {
      const shared = minutesOf(one).filter((at) => minutesOf(other).some((b) => +b === +at))
      const [from] = shared
      const last = shared.at(-1)
      if (one.isCalledOff || other.isCalledOff || !from || !last) return []
      const coaches = one.coachIds.filter((id) => other.coachIds.includes(id))
      const areas = one.areas.flatMap((a) =>
        other.areas.flatMap((b) => {
          const units = unitsOf(a).filter((unit) => unitsOf(b).includes(unit))
          const isShared = a.areaId === b.areaId && units.length > 0
          return isShared ? [[a.areaId, units[0], units.at(-1)].join('/')] : []
        }),
      )
      const ids = [one.id, other.id].sort()
      const when = [from.toISOString(), new Date(+last + 60_000).toISOString()]
      return [...coaches, ...areas].map((what) => [...ids, what, ...when].join(' '))
    }),
  )
}
