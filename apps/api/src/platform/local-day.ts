const formats = new Map<string, Intl.DateTimeFormat>()

/** The calendar day of an instant in a zone: "2026-04-06". */
export function localDayOf(instant: Date, zone: string): string {
  let format = formats.get(zone)
  if (!format) {
    // The Canadian form of a date is ISO 8601's.
    format = new Intl.DateTimeFormat('en-CA', { timeZone: zone, dateStyle: 'short' })
    formats.set(zone, format)
  }
  return format.format(instant)
}
