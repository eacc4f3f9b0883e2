import { describe, expect, it } from 'vitest'
import { refusalFor } from './what-and-who'

const sevens = { ageMin: 7, ageMax: 10, zone: 'Europe/Dublin' }
const adults = { ageMin: 18, ageMax: null, zone: 'Europe/Dublin' }
const child = (bornOn: string | null) => ({ isMe: false, bornOn })
const me = (bornOn: string | null) => ({ isMe: true, bornOn })
const THE_SIXTH = '2031-03-06T17:00:00.000Z'

describe('who fits a clinic by age', () => {
  it.each([
    ['turns seven on the day of the first session', '2024-03-06', undefined],
    ['turns seven a day later', '2024-03-07', 'This clinic is for ages 7 and up.'],
    ['is ten until the day after', '2020-03-07', undefined],
    ['turns eleven on that day', '2020-03-06', 'This clinic is for ages up to 10.'],
    ['has no birth date yet', null, undefined],
  ])('a child who %s', (_, bornOn, refusal) => {
    expect(refusalFor(child(bornOn), sevens, THE_SIXTH).refusal).toBe(refusal)
  })

  it('counts the day at the venue, not in London', () => {
    const lateInDenver = '2031-03-07T04:00:00.000Z'
    const atDenver = { ...sevens, zone: 'America/Denver' }
    expect(refusalFor(child('2024-03-07'), atDenver, lateInDenver).refusal).toBeDefined()
    expect(refusalFor(child('2024-03-07'), sevens, lateInDenver).refusal).toBeUndefined()
  })

  it('takes somebody with an account and no birth date for grown up', () => {
    expect(refusalFor(me(null), adults, THE_SIXTH)).toEqual({})
    expect(refusalFor(null, adults, THE_SIXTH)).toEqual({})
    expect(refusalFor(null, sevens, THE_SIXTH).refusal).toBe('This clinic is for ages up to 10.')
  })

  it('asks no age where the clinic has none', () => {
    const anyAge = { ageMin: null, ageMax: null, zone: 'Europe/Dublin' }
    expect(refusalFor(child('2030-01-01'), anyAge, THE_SIXTH)).toEqual({})
  })
})
