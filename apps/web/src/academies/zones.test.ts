import { expect, it } from 'vitest'
import { likelyCurrency, ownZone, zoneOptions } from './zones'

it.each(['America/Denver', 'Europe/Dublin'])('takes the browser’s own %s', (zone) => {
  expect(ownZone(zone)).toBe(zone)
})

it.each(['UTC', 'Etc/GMT+5', ''])('falls back to a listed zone in a browser set to %j', (zone) => {
  expect(zoneOptions.map(({ value }) => value)).toContain(ownZone(zone))
})

it.each([
  ['Europe/Dublin', 'EUR'],
  ['Europe/London', 'GBP'],
  ['America/Denver', 'USD'],
  ['America/Toronto', 'CAD'],
  ['Asia/Tokyo', 'JPY'],
])('guesses for %s that it counts in %s', (zone, currency) => {
  expect(likelyCurrency(zone)).toBe(currency)
})
