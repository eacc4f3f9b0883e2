import { describe, expect, it } from 'vitest'
import { allByMonth, inInk, totalOf, type MonthMoney } from './month-money'

const month = (earnedMinor: number, toEarnMinor: number): MonthMoney => ({
  earnedMinor,
  toEarnMinor,
})

/** A year in which only the months given have anything. */
const year = (given: Record<number, MonthMoney>) =>
  Array.from({ length: 12 }, (_, index) => given[index] ?? month(0, 0))

describe('the money of months', () => {
  it('keeps ink and pencil apart, of either sign', () => {
    const total = totalOf([month(1_000, 500), month(-200, 0), month(0, 300)])
    expect(total).toEqual(month(800, 800))
    expect(totalOf([])).toEqual(month(0, 0))
  })

  it('counts late cancellations with what all clinics earned', () => {
    const card = {
      clinics: [
        { clinicId: 'a', title: 'Low and long', months: year({ 8: month(1_377, 2_754) }) },
        { clinicId: 'b', title: 'Bunkers', months: year({ 8: month(900, 0), 9: month(0, 450) }) },
      ],
      lateCancellations: year({ 9: month(120, 0) }).map(({ earnedMinor }) => earnedMinor),
    }
    expect(allByMonth(card)).toEqual(year({ 8: month(2_277, 2_754), 9: month(120, 450) }))
  })

  it('has nothing in pencil of what is never paid ahead', () => {
    expect(inInk([0, 230])).toEqual([month(0, 0), month(230, 0)])
  })
})
