import {
  datesOfRun,
  formatRecurrence,
  parseRecurrence,
  planRun,
  sunTimes,
  toInstant,
  transitionsBetween,
} from '@marram/schedule'
import { formatLocalDay, formatSessionTime } from '@marram/schedule/format'

/**
 * Prints all that the schedule can say about some rules in some zones, as JSON. The test runs it in
 * processes with different TZ: not a letter may differ.
 */
const RULES = [
  'FREQ=DAILY;COUNT=40',
  'FREQ=WEEKLY;BYDAY=TU;COUNT=30',
  'FREQ=WEEKLY;INTERVAL=2;BYDAY=TU,SU;WKST=SU;COUNT=20',
  'FREQ=WEEKLY;UNTIL=20261101T053000Z',
  'FREQ=MONTHLY;BYMONTHDAY=15,30,-1;COUNT=20',
  'FREQ=MONTHLY;BYDAY=MO,TU,WE,TH,FR;BYSETPOS=-2;COUNT=14',
  'FREQ=MONTHLY;BYDAY=-1SU;COUNT=14',
]
const ZONES = ['Europe/Dublin', 'America/Denver', 'Australia/Sydney', 'America/Phoenix']
const STARTS = ['00:30', '01:30', '02:30', '18:00', '23:45']

const said = ZONES.flatMap((zone) =>
  RULES.flatMap((rruleText) =>
    STARTS.map((startsAtLocal) => {
      const parsed = parseRecurrence(rruleText, { zone })
      if (!parsed.ok) throw new Error(parsed.sentence)
      const times = { startsOnLocal: '2026-03-01', startsAtLocal, durationMinutes: 75, zone }
      const run = { ...times, rule: parsed.rule, skipDates: ['2026-03-29', '2026-04-07'] }
      const dates = datesOfRun(run)
      return {
        rule: formatRecurrence(parsed.rule),
        planned: planRun({ ...times, rruleText }),
        dates,
        texts: dates.map((date) => [
          formatSessionTime({ ...date, zone, locale: 'en-IE' }),
          formatSessionTime({ ...date, zone, locale: 'en-US' }),
          formatLocalDay({ dayLocal: date.startsOnLocal, locale: 'en-IE', style: 'full' }),
        ]),
        sun: sunTimes({ latitudeDeg: 53.35, longitudeDeg: -6.26, dayLocal: '2026-03-29', zone }),
        noonAt: toInstant({ startsOnLocal: '2026-10-25', startsAtLocal: '12:00', zone }),
        changes: transitionsBetween({
          zone,
          from: new Date('2026-01-01T00:00:00Z'),
          to: new Date('2028-01-01T00:00:00Z'),
        }),
      }
    }),
  ),
)

process.stdout.write(
  JSON.stringify({ offsetMinutes: new Date(Date.UTC(2026, 6, 1)).getTimezoneOffset(), said }),
)
