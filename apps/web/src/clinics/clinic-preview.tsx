import type { Answer } from '@marram/contract'
import { formatLocalDay } from '@marram/schedule/format'
import type { Format } from '../academies/format'
import { Tag } from '../ui/tag'
import { LightChart } from './light-chart'

type Preview = Answer<'clinics.preview'>

/** Every date of a clinic while it is written: its light, and what is in the way. */
export function ClinicPreview(props: {
  preview: Preview
  format: Format
  skipDates: readonly string[]
  onSkip: (day: string) => void
  onKeep: (day: string) => void
}) {
  const { preview, format, skipDates, onSkip, onKeep } = props
  const { dates, holidays } = preview
  const clear = dates.filter(
    ({ clashes, darkMinutes, isPast }) => clashes.length === 0 && darkMinutes === 0 && !isPast,
  )
  const holidayOn = new Map(holidays.map(({ dayLocal, name }) => [dayLocal, name]))
  return (
    <>
      {preview.light.length > 1 && <LightChart preview={preview} format={format} />}
      <div className="sect">
        <h2>
          {dates.length} {dates.length === 1 ? 'date' : 'dates'}, {clear.length} clear
        </h2>
        <span className="soft">{preview.recurrence}</span>
      </div>
      <div className="card">
        <table className="sc found">
          <thead>
            <tr>
              <th scope="col">No.</th>
              <th scope="col" className="l">
                Date
              </th>
              <th scope="col" className="ctr">
                Time
              </th>
              <th scope="col" className="ctr">
                {format.dusk.word}
              </th>
              <th scope="col" className="l">
                What we found
              </th>
              <th scope="col" className="l">
                Put it right
              </th>
            </tr>
          </thead>
          <tbody>
            {dates.map((date) => (
              <tr key={date.startsOnLocal}>
                <th scope="row">{date.number}</th>
                <td className="l">{format.day(date.startsAt)}</td>
                <td className="ctr">{format.range(date)}</td>
                <td className="ctr">
                  <span className="soft sm:hidden">{format.dusk.word} </span>
                  {date.duskAt ? format.time(date.duskAt) : '–'}
                </td>
                <td className="l">
                  <Found
                    date={date}
                    holiday={holidayOn.get(date.startsOnLocal)}
                    dusk={format.dusk.inText}
                  />
                </td>
                <td className="l">
                  <button
                    type="button"
                    className="linkish"
                    onClick={() => onSkip(date.startsOnLocal)}
                  >
                    Leave it out
                  </button>
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {skipDates.length > 0 && (
        <p className="my-3">
          Left out:{' '}
          {skipDates.map((day) => (
            <span key={day} className="mr-3">
              {formatLocalDay({ dayLocal: day, locale: format.locale, style: 'short' })}{' '}
              <button type="button" className="linkish" onClick={() => onKeep(day)}>
                put back
              </button>
            </span>
          ))}
        </p>
      )}
    </>
  )
}

function Found(props: {
  date: Preview['dates'][number]
  holiday: string | undefined
  dusk: string
}) {
  const { date, holiday, dusk } = props
  const isClear = date.clashes.length === 0 && date.darkMinutes === 0 && !holiday && !date.isPast
  if (isClear) {
    return (
      <Tag kind="ok" drawing="tick">
        Clear
      </Tag>
    )
  }
  const minutes = Math.round((Date.parse(date.endsAt) - Date.parse(date.startsAt)) / 60_000)
  return (
    <span className="actions">
      {date.clashes.map(({ sentence }) => (
        <Tag key={sentence} kind="flag" drawing="flag">
          {sentence}
        </Tag>
      ))}
      {date.darkMinutes > 0 && (
        <Tag kind="haar" drawing="dusk">
          {date.darkMinutes >= minutes
            ? `All of it after ${dusk}, no lamps`
            : `Ends ${date.darkMinutes} min after ${dusk}, no lamps`}
        </Tag>
      )}
      {holiday && (
        <Tag kind="haar" drawing="calendar">
          {holiday}
        </Tag>
      )}
      {date.isPast && <span className="soft">Already past</span>}
    </span>
  )
}
