import type Holidays from 'date-holidays'
import { localDayOf } from '../platform/local-day'

export interface Holiday {
  dayLocal: string
  name: string
}

/**
 * Zones that several countries keep, by the country whose city gives the zone its name. Whoever
 * lives in another of them is better off with no holidays than with a neighbour's, and can choose
 * a zone of their own where there is one (Europe/Zagreb).
 */
export const COUNTRY_OF_SHARED_ZONE: Readonly<Record<string, string>> = {
  'Africa/Abidjan': 'CI',
  'Africa/Johannesburg': 'ZA',
  'Africa/Lagos': 'NG',
  'Africa/Maputo': 'MZ',
  'Africa/Nairobi': 'KE',
  'America/Curacao': 'CW',
  'America/Panama': 'PA',
  'America/Port_of_Spain': 'TT',
  'Asia/Bangkok': 'TH',
  'Atlantic/Canary': 'ES',
  'Europe/Belgrade': 'RS',
  'Europe/Helsinki': 'FI',
  'Europe/Oslo': 'NO',
  'Europe/Rome': 'IT',
  'Europe/Zurich': 'CH',
}

/**
 * Public holidays of the country that a zone lies in, for a run to leave out. None where the zone
 * does not tell the country.
 */
export async function listHolidays(span: {
  zone: string
  from: Date
  to: Date
}): Promise<Holiday[]> {
  // Loaded when first asked for: the library brings the calendars of the whole world.
  const { default: Calendar } = await import('date-holidays')
  const country = countryOf(span.zone, Calendar)
  if (!country) return []
  const calendar = new Calendar(country)
  const first = localDayOf(span.from, span.zone)
  const last = localDayOf(span.to, span.zone)
  const found: Holiday[] = []
  for (let year = Number(first.slice(0, 4)); year <= Number(last.slice(0, 4)); year += 1) {
    for (const { date, name, type } of calendar.getHolidays(year)) {
      const dayLocal = date.slice(0, 10)
      if (type === 'public' && dayLocal >= first && dayLocal <= last) found.push({ dayLocal, name })
    }
  }
  return found
}

const countries = new Map<string, string | null>()

function countryOf(zone: string, Calendar: typeof Holidays): string | null {
  const known = COUNTRY_OF_SHARED_ZONE[zone] ?? countries.get(zone)
  if (known !== undefined) return known
  const codes = Object.keys(new Calendar().getCountries())
  const country = codes.find((code) => new Calendar(code).getTimezones().includes(zone)) ?? null
  countries.set(zone, country)
  return country
}
