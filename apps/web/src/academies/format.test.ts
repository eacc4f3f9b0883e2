import { describe, expect, it } from 'vitest'
import { makeFormat } from './format'

const moneyIn = (currency: string, locale = 'en-IE') =>
  makeFormat({ currency, locale, zone: 'Europe/Dublin', duskKind: 'sunset' })

describe('money as an academy writes it', () => {
  // By ISO 4217 the yen has no minor unit, the euro a hundred, the dinar of Kuwait a thousand.
  it.each([
    ['JPY', 12_000, '12,000'],
    ['EUR', 108_000, '1,080'],
    ['EUR', -1_849, '−18'],
    ['KWD', 12_500, '13'],
    ['KWD', 1_080_000, '1,080'],
  ])('is whole on a card, in %s: %i', (currency, amountMinor, text) => {
    expect(moneyIn(currency).cardMoney(amountMinor)).toBe(text)
  })

  it('is an en rule on a card where there is none', () => {
    expect(moneyIn('EUR').cardMoney(0)).toBe('–')
  })

  it.each([
    ['JPY', 1_250, /^\D*1,250$/],
    ['EUR', 10_800, /^€108$/],
    ['EUR', 10_850, /^€108\.50$/],
    ['KWD', 12_000, /12$/],
    ['KWD', 12_100, /12\.100$/],
  ])('has cents in a list only where there are some, in %s: %i', (currency, amountMinor, text) => {
    expect(moneyIn(currency).shortMoney(amountMinor)).toMatch(text)
  })
})

describe('the dusk an academy goes by', () => {
  it('has the name of what was chosen', () => {
    const place = { currency: 'EUR', locale: 'en-IE', zone: 'Europe/Dublin' }
    expect(makeFormat({ ...place, duskKind: 'sunset' }).dusk.word).toBe('Sunset')
    expect(makeFormat({ ...place, duskKind: 'civil' }).dusk.word).toBe('End of twilight')
  })
})
