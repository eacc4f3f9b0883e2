import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { ageOn, isMinor, misfitOf, misfitSentence } from './rules'

describe('an age', () => {
  it.each([
    { bornOn: '2016-05-02', day: '2031-05-01', years: 14 },
    { bornOn: '2016-05-02', day: '2031-05-02', years: 15 },
    { bornOn: '2016-05-02', day: '2031-05-03', years: 15 },
    { bornOn: '2016-02-29', day: '2031-02-28', years: 14 },
    { bornOn: '2016-02-29', day: '2031-03-01', years: 15 },
    { bornOn: '2016-02-29', day: '2032-02-29', years: 16 },
    { bornOn: '2031-01-01', day: '2031-01-01', years: 0 },
  ])('of $bornOn on $day is $years', ({ bornOn, day, years }) => {
    expect(ageOn(bornOn, day)).toBe(years)
  })

  it('rises by one a year, and never within one', () => {
    const days = fc.date({
      min: new Date('1930-01-01'),
      max: new Date('2030-12-28'),
      noInvalidDate: true,
    })
    fc.assert(
      fc.property(days, days, (born, on) => {
        const [bornOn, day] = [born, on].map((date) => date.toISOString().slice(0, 10)).sort()
        const nextYear = `${Number(day!.slice(0, 4)) + 1}${day!.slice(4)}`
        expect(ageOn(bornOn!, nextYear)).toBe(ageOn(bornOn!, day!) + 1)
      }),
    )
  })
})

describe('a junior', () => {
  it.each([
    { who: 'somebody of 17', bornOn: '2013-04-02', guardianAccountId: null, is: true },
    { who: 'somebody of 18', bornOn: '2013-04-01', guardianAccountId: null, is: false },
    {
      who: 'a dependant who has come of age',
      bornOn: '2013-04-01',
      guardianAccountId: 'g',
      is: false,
    },
    { who: 'a dependant without a birth date', bornOn: null, guardianAccountId: 'g', is: true },
    { who: 'anybody else without one', bornOn: null, guardianAccountId: null, is: false },
  ])('is $who: $is', ({ bornOn, guardianAccountId, is }) => {
    expect(isMinor({ bornOn, guardianAccountId }, '2031-04-01')).toBe(is)
  })
})

describe('a golfer and a level', () => {
  const DAY = '2031-04-01'
  const anybody = { handicapMin: null, handicapMax: null, ageMin: null, ageMax: null }
  const ages = (ageMin: number | null, ageMax: number | null) => ({ ...anybody, ageMin, ageMax })
  const handicaps = (min: number | null, max: number | null) => ({
    ...anybody,
    handicapMin: min,
    handicapMax: max,
  })
  const aged = (years: number) => ({
    bornOn: `${2031 - years}-04-01`,
    handicap: null,
    isAccountHolder: false,
  })
  const unknown = { bornOn: null, handicap: null, isAccountHolder: false }
  const holder = { ...unknown, isAccountHolder: true }
  const plays = (handicap: number) => ({ ...unknown, handicap })

  it.each([
    { golfer: unknown, clinic: anybody, misfit: null },
    { golfer: aged(9), clinic: ages(10, 14), misfit: 'too-young' },
    { golfer: aged(10), clinic: ages(10, 14), misfit: null },
    { golfer: aged(14), clinic: ages(10, 14), misfit: null },
    { golfer: aged(15), clinic: ages(10, 14), misfit: 'too-old' },
    { golfer: unknown, clinic: ages(10, null), misfit: 'age-unknown' },
    { golfer: holder, clinic: ages(null, 17), misfit: 'too-old' },
    { golfer: holder, clinic: ages(18, null), misfit: null },
    { golfer: holder, clinic: ages(50, null), misfit: null },
    { golfer: plays(9.9), clinic: handicaps(10, 20), misfit: 'handicap-outside' },
    { golfer: plays(10), clinic: handicaps(10, 20), misfit: null },
    { golfer: plays(20), clinic: handicaps(10, 20), misfit: null },
    { golfer: plays(20.1), clinic: handicaps(null, 20), misfit: 'handicap-outside' },
    { golfer: unknown, clinic: handicaps(null, 20), misfit: 'handicap-unknown' },
  ])('are at odds by $misfit', ({ golfer, clinic, misfit }) => {
    expect(misfitOf(golfer, clinic, DAY)).toBe(misfit)
  })

  it('are told apart in words', () => {
    expect(misfitSentence('too-young', 'Oona', ages(10, 14))).toBe(
      'Oona is too young for this clinic: it is for ages 10 to 14.',
    )
    expect(misfitSentence('handicap-unknown', 'Oona', handicaps(null, 20))).toBe(
      "This clinic is for handicap 20 and under. Please give Oona's handicap first.",
    )
  })
})
