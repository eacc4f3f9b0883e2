/** Zones by their names, `Europe/Dublin`; written as people say them, "Dublin time". */
export const zoneOptions = Intl.supportedValuesOf('timeZone')
  .filter((zone) => zone.includes('/') && !zone.startsWith('Etc/'))
  .map((zone) => ({ value: zone, label: `${zoneName(zone)} time` }))
  .sort((a, b) => a.label.localeCompare(b.label))

const FALLBACK_ZONE = 'Europe/Dublin'

/** The browser's zone where it is one of a place; a browser set to UTC says nothing of where it is. */
export function ownZone(zone = Intl.DateTimeFormat().resolvedOptions().timeZone): string {
  return zoneOptions.some(({ value }) => value === zone) ? zone : FALLBACK_ZONE
}

/** "Europe/Dublin" is Dublin. */
function zoneName(zone: string): string {
  return (zone.split('/').at(-1) ?? zone).replaceAll('_', ' ')
}

export const CURRENCIES = [
  { value: 'EUR', label: 'euro' },
  { value: 'USD', label: 'US dollars' },
  { value: 'GBP', label: 'pounds sterling' },
  { value: 'CAD', label: 'Canadian dollars' },
  { value: 'AUD', label: 'Australian dollars' },
  { value: 'NZD', label: 'New Zealand dollars' },
  { value: 'JPY', label: 'yen' },
] as const

export type Currency = (typeof CURRENCIES)[number]['value']

/** The currency that is likely for a zone; the owner changes it where that is wrong. */
export function likelyCurrency(zone: string): Currency {
  if (/^(Europe\/London|Europe\/Belfast)/.test(zone)) return 'GBP'
  if (/^(Pacific\/Auckland)/.test(zone)) return 'NZD'
  if (/^Australia\//.test(zone)) return 'AUD'
  if (/^America\/(Toronto|Vancouver|Edmonton|Winnipeg|Halifax|Regina|St_Johns)/.test(zone)) {
    return 'CAD'
  }
  if (/^America\//.test(zone)) return 'USD'
  if (zone === 'Asia/Tokyo') return 'JPY'
  return 'EUR'
}
