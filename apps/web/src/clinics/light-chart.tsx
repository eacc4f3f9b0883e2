import type { Answer } from '@marram/contract'
import { formatLocalTime } from '@marram/schedule/format'
import type { Format } from '../academies/format'
import { minutesOfDay, timeLocalOf } from './board-times'

type Preview = Answer<'clinics.preview'>

const WIDTH = 1120
const HEIGHT = 180
const LEFT = 56
const RIGHT = 16
const TOP = 14
const BOTTOM = 34

/** The light over a run: dusk from day to day, and each session against it. */
export function LightChart({ preview, format }: { preview: Preview; format: Format }) {
  const { light, dates, clockChanges } = preview
  const days = new Map(light.map(({ dayLocal }, index) => [dayLocal, index]))
  const starts = dates.map(({ startsAt }) => minutesOfDay(startsAt, format.zone))
  const ends = dates.map(({ endsAt }) => minutesOfDay(endsAt, format.zone))
  const dusks = light.flatMap(({ duskLocalMinutes }) => duskLocalMinutes ?? [])
  const first = Math.min(...starts, ...dusks) - 30
  const last = Math.max(...ends, ...dusks) + 30
  const x = (day: string) =>
    LEFT + ((days.get(day) ?? 0) / Math.max(1, light.length - 1)) * (WIDTH - LEFT - RIGHT)
  const y = (minutes: number) =>
    TOP + ((minutes - first) / (last - first)) * (HEIGHT - TOP - BOTTOM)
  const curve = light
    .filter(({ duskLocalMinutes }) => duskLocalMinutes !== null)
    .map(
      ({ dayLocal, duskLocalMinutes }) =>
        `${x(dayLocal).toFixed(1)},${y(duskLocalMinutes ?? 0).toFixed(1)}`,
    )
  const [from] = curve
  const hours = Array.from({ length: 25 }, (_, hour) => hour * 60).filter(
    (minutes) => minutes > first && minutes < last,
  )
  const labelled = dates.filter((_, index) => index % Math.ceil(dates.length / 10) === 0)
  const dark = dates.filter(({ darkMinutes }) => darkMinutes > 0).length
  const spoken =
    dark === 0
      ? 'Every session ends in daylight, or has lamps or a roof.'
      : `${dark} of ${dates.length} sessions run past ${format.dusk.inText} without lamps.`
  return (
    <>
      <div className="sect">
        <h2>The light</h2>
        <span className="soft">{spoken}</span>
      </div>
      <div className="card">
        <svg
          viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
          className="plot light"
          role="img"
          aria-label={spoken}
        >
          {hours.map((minutes) => (
            <g key={minutes}>
              <path className="gr" d={`M${LEFT} ${y(minutes)}H${WIDTH - RIGHT}`} />
              <text x={LEFT - 8} y={y(minutes) + 5} textAnchor="end">
                {formatLocalTime({ timeLocal: timeLocalOf(minutes), locale: format.locale })}
              </text>
            </g>
          ))}
          {from && (
            <>
              <path
                d={`M${curve.join('L')}V${HEIGHT - BOTTOM}H${from.split(',')[0] ?? ''}Z`}
                fill="var(--color-haar-wash)"
              />
              <path
                d={`M${curve.join('L')}`}
                fill="none"
                stroke="var(--color-haar)"
                strokeWidth="3"
              />
            </>
          )}
          {dates.map((date, index) => {
            const start = y(starts[index] ?? 0)
            const end = y(ends[index] ?? 0)
            const isDark = date.darkMinutes > 0
            return (
              <rect
                key={date.startsOnLocal}
                x={x(date.startsOnLocal) - 8}
                width={16}
                y={start}
                height={Math.max(4, end - start)}
                fill={isDark ? 'var(--color-paper)' : 'var(--color-ink)'}
                stroke={isDark ? 'var(--color-flag)' : 'var(--color-ink)'}
                strokeWidth="2"
              />
            )
          })}
          {clockChanges.map(({ dayLocal, direction }) => (
            <text key={dayLocal} x={x(dayLocal)} y={TOP + 10} textAnchor="middle">
              Clocks go {direction}
            </text>
          ))}
          {labelled.map(({ startsOnLocal, startsAt }) => (
            <text key={startsOnLocal} x={x(startsOnLocal)} y={HEIGHT - 10} textAnchor="middle">
              {format.day(startsAt, 'short')}
            </text>
          ))}
        </svg>
      </div>
    </>
  )
}
