import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { agreePrice, isFull, isLapsed, offerUntil, sessionsAhead } from './rules'

const at = (text: string) => new Date(`2031-04-01T${text}Z`)
const sum = (amounts: readonly number[]) => amounts.reduce((total, each) => total + each, 0)

describe('the sessions ahead', () => {
  const session = (
    number: number,
    startsAt: Date,
    state: 'planned' | 'called-off' = 'planned',
  ) => ({
    id: `session-${number}`,
    number,
    startsAt,
    state,
  })

  it.each([
    { when: 'a millisecond before it begins', now: at('17:59:59.999'), isAhead: true },
    { when: 'as it begins', now: at('18:00:00.000'), isAhead: false },
    { when: 'a millisecond after', now: at('18:00:00.001'), isAhead: false },
  ])('have one in them $when: $isAhead', ({ now, isAhead }) => {
    expect(sessionsAhead([session(1, at('18:00:00'))], now)).toHaveLength(isAhead ? 1 : 0)
  })

  it('are in order of number, without those called off', () => {
    const run = [
      session(3, at('20:00:00')),
      session(2, at('19:00:00'), 'called-off'),
      session(1, at('18:00:00')),
    ]
    expect(sessionsAhead(run, at('12:00:00')).map(({ number }) => number)).toEqual([1, 3])
  })
})

describe('an agreed price', () => {
  const places = (numbers: readonly number[]) =>
    numbers.map((number) => ({ id: `session-${number}`, number }))
  const run = (sessionCount: number) => ({ kind: 'run', sessionCount }) as const
  const included = (basisPoints: number) => ({ mode: 'included', basisPoints }) as const
  const given = {
    wanted: run(3),
    taken: places([1, 2, 3]),
    runPriceMinor: 10_000,
    dropInPriceMinor: 4_000,
    isFree: false,
    tax: included(900),
  }

  it.each([
    { what: 'a run, tax included', change: {}, netMinor: 9_174, taxMinor: 826 },
    {
      what: 'a run, tax added',
      change: { tax: { mode: 'added', basisPoints: 900 } as const },
      netMinor: 10_000,
      taxMinor: 900,
    },
    {
      what: 'what is left of a run',
      change: { taken: places([1, 3]) },
      netMinor: 6_117,
      taxMinor: 550,
    },
    {
      what: 'one session',
      change: { wanted: { kind: 'session' } as const, taken: places([2]) },
      netMinor: 3_670,
      taxMinor: 330,
    },
    { what: 'what is free', change: { isFree: true }, netMinor: 0, taxMinor: 0 },
  ])('of $what', ({ change, netMinor, taxMinor }) => {
    expect(agreePrice({ ...given, ...change })).toMatchObject({ netMinor, taxMinor })
  })

  const wishes = fc
    .record({
      runPriceMinor: fc.nat(1_000_000),
      sessionCount: fc.integer({ min: 1, max: 40 }),
      basisPoints: fc.nat(2_500),
      mode: fc.constantFrom('included' as const, 'added' as const),
    })
    .chain((wish) => {
      const numbers = Array.from({ length: wish.sessionCount }, (_, index) => index + 1)
      const remaining = fc.subarray(numbers, { minLength: 1 })
      return remaining.map((taken) => ({ ...wish, taken }))
    })

  it('is allocated to its places to the last unit, none of them below zero', () => {
    fc.assert(
      fc.property(wishes, ({ runPriceMinor, sessionCount, basisPoints, mode, taken }) => {
        const tax = { mode, basisPoints }
        const wish = { ...given, runPriceMinor, wanted: run(sessionCount), tax }
        const price = agreePrice({ ...wish, taken: places(taken) })
        expect(sum(price.places.map(({ netMinor }) => netMinor))).toBe(price.netMinor)
        expect(sum(price.places.map(({ taxMinor }) => taxMinor))).toBe(price.taxMinor)
        for (const place of price.places) {
          expect(Math.min(place.netMinor, place.taxMinor)).toBeGreaterThanOrEqual(0)
        }
      }),
    )
  })

  it('of all the sessions of a run is the price of the run, where tax is included', () => {
    fc.assert(
      fc.property(wishes, ({ runPriceMinor, sessionCount, basisPoints, taken }) => {
        const wish = {
          ...given,
          runPriceMinor,
          wanted: run(sessionCount),
          tax: included(basisPoints),
        }
        const gross = (numbers: readonly number[]) => {
          const { netMinor, taxMinor } = agreePrice({ ...wish, taken: places(numbers) })
          return netMinor + taxMinor
        }
        const numbers = Array.from({ length: sessionCount }, (_, index) => index + 1)
        const others = numbers.filter((number) => !taken.includes(number))
        const rest = others.length > 0 ? gross(others) : 0
        expect(gross(taken) + rest).toBe(runPriceMinor)
      }),
    )
  })
})

describe('a session', () => {
  it.each([
    { held: 0, confirmed: 11, is: false },
    { held: 1, confirmed: 10, is: false },
    { held: 1, confirmed: 11, is: true },
    { held: 12, confirmed: 0, is: true },
  ])('of twelve with $held held and $confirmed confirmed is full: $is', ({ is, ...taken }) => {
    expect(isFull({ ...taken, capacity: 12 })).toBe(is)
  })
})

describe('a hold', () => {
  it.each([
    { when: 'a millisecond before its end', now: at('17:59:59.999'), isOver: false },
    { when: 'at its end', now: at('18:00:00.000'), isOver: false },
    { when: 'a millisecond after', now: at('18:00:00.001'), isOver: true },
  ])('has lapsed $when: $isOver', ({ now, isOver }) => {
    expect(isLapsed(at('18:00:00.000'), now)).toBe(isOver)
  })
})

describe('an offer', () => {
  it.each([
    { when: 'with time to spare', starts: at('23:00:00'), until: at('22:00:00') },
    { when: 'as its hours end', starts: at('22:00:00'), until: at('22:00:00') },
    { when: 'before its hours end', starts: at('21:59:59.999'), until: at('21:59:59.999') },
  ])('stands until the session begins, $when', ({ starts, until }) => {
    const offer = { now: at('10:00:00'), offerHours: 12, firstStartsAt: starts }
    expect(offerUntil(offer)).toEqual(until)
  })
})
