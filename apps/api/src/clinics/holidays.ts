import { localDayOf } from '../platform/local-day'

export interface Holiday {
  dayLocal: string
  name: string
}

/** Public holidays of the academy's country in a span of time, for a run to leave out. */
export async function listHolidays(span: {
  locale: string
  from: Date
  to: Date
}): Promise<Holiday[]> {
  const country = span.locale.split('-')[1]
  if (!country) return []
  // Loaded when first asked for: the library brings the calendars of the whole world.
  const { default: Holidays } = await import('date-holidays')
  const calendar = new Holidays(country)
  const first = localDayOf(span.from, 'UTC')
  const last = localDayOf(span.to, 'UTC')
  const found: Holiday[] = []
  for (let year = Number(first.slice(0, 4)); year <= Number(last.slice(0, 4)); year += 1) {
    for (const { date, name, type } of calendar.getHolidays(year)) {
      const dayLocal = date.slice(0, 10)
      if (type === 'public' && dayLocal >= first && dayLocal <= last) found.push({ dayLocal, name })
    }
  }
  return found
}
