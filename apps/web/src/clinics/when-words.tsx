import { Fragment } from 'react'
import { formatDuration } from '@marram/schedule/format'
import { InputWord, SelectWord } from '../ui/sentence'
import { hasUnsaidRule } from './draft'
import { WEEKDAYS, dayCodeOf } from './rule-words'
import type { SentencePart } from './sentence-part'

const DAY_NAMES = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday']
const DAYS: { value: string; label: string }[] = WEEKDAYS.map((value, index) => ({
  value,
  label: DAY_NAMES[index] ?? value,
}))
const DURATIONS = [30, 45, 50, 60, 75, 90, 120, 150, 180]
const INTERVALS = [
  { value: '1', label: 'Every' },
  { value: '2', label: 'Every second' },
  { value: '3', label: 'Every third' },
  { value: '4', label: 'Every fourth' },
]

/** "Every Tuesday from 15 September at 18:00 for 1 hour 15 minutes, 8 sessions". */
export function WhenWords({ draft, onChange, isWrong }: SentencePart) {
  const chooseDate = (startsOnLocal: string) =>
    onChange({
      startsOnLocal,
      ...(startsOnLocal && draft.weekdays.length === 1
        ? { weekdays: [dayCodeOf(startsOnLocal)] }
        : {}),
    })
  return (
    <>
      {hasUnsaidRule(draft) ? (
        draft.savedRule?.recurrence
      ) : (
        <>
          <SelectWord
            label="How often"
            value={draft.interval}
            onChange={(interval) => onChange({ interval })}
            options={intervals(draft.interval)}
          />{' '}
          <WeekdayWords weekdays={draft.weekdays} onChange={(weekdays) => onChange({ weekdays })} />
        </>
      )}{' '}
      from{' '}
      <InputWord
        label="First day"
        type="date"
        value={draft.startsOnLocal}
        onChange={chooseDate}
        isWrong={isWrong('startsOnLocal')}
      />{' '}
      at{' '}
      <InputWord
        label="Start time"
        type="time"
        value={draft.startsAtLocal}
        onChange={(startsAtLocal) => onChange({ startsAtLocal })}
        isWrong={isWrong('startsAtLocal')}
      />{' '}
      for{' '}
      <SelectWord
        label="Duration"
        value={draft.durationMinutes}
        onChange={(durationMinutes) => onChange({ durationMinutes })}
        options={durations(draft.durationMinutes)}
        isWrong={isWrong('durationMinutes')}
      />
      <HowLongWords draft={draft} onChange={onChange} isWrong={isWrong} />
    </>
  )
}

/** ", 8 sessions", or ", until 20 October" where the run was saved so. */
function HowLongWords(props: Pick<SentencePart, 'draft' | 'onChange' | 'isWrong'>) {
  const { draft, onChange, isWrong } = props
  if (hasUnsaidRule(draft)) return null
  if (draft.lastDay !== '') {
    return (
      <>
        , until{' '}
        <InputWord
          label="Last day"
          type="date"
          value={draft.lastDay}
          // A date that is half typed is empty; the run keeps its end until another is whole.
          onChange={(lastDay) => lastDay && onChange({ lastDay })}
          isWrong={isWrong('rrule')}
        />
      </>
    )
  }
  return (
    <>
      ,{' '}
      <InputWord
        label="How many sessions"
        type="number"
        min={1}
        max={60}
        value={draft.sessions}
        onChange={(sessions) => onChange({ sessions })}
        isWrong={isWrong('rrule')}
      />{' '}
      {draft.sessions === '1' ? 'session' : 'sessions'}
    </>
  )
}

/** One day of the week, or several: "Tuesday and Thursday". */
function WeekdayWords(props: {
  weekdays: readonly string[]
  onChange: (weekdays: string[]) => void
}) {
  const { weekdays, onChange } = props
  const [first = 'MO', ...others] = weekdays
  const left = (own: string) =>
    DAYS.filter(({ value }) => value === own || !weekdays.includes(value))
  return (
    <>
      <SelectWord
        label="Day"
        value={first}
        onChange={(day) => onChange([day, ...others])}
        options={left(first)}
      />
      {others.map((day, index) => (
        <Fragment key={day}>
          {' and '}
          <SelectWord
            label={`Day ${index + 2}`}
            value={day}
            onChange={(next) =>
              onChange([first, ...others.map((had) => (had === day ? next : had)).filter(Boolean)])
            }
            options={[...left(day), { value: '', label: 'no other day' }]}
          />
        </Fragment>
      ))}{' '}
      {weekdays.length < 3 && (
        <button
          type="button"
          className="pick more"
          onClick={() => onChange([...weekdays, left('')[0]?.value ?? first])}
        >
          and …<span className="vh"> another day</span>
        </button>
      )}
    </>
  )
}

/** The intervals to choose from, with a rarer one that the clinic has. */
function intervals(own: string) {
  if (INTERVALS.some(({ value }) => value === own)) return INTERVALS
  return [...INTERVALS, { value: own, label: `Every ${own} weeks on` }]
}

function durations(current: string) {
  const own = Number(current)
  const minutes = new Set(own > 0 ? [...DURATIONS, own] : DURATIONS)
  return [...minutes]
    .sort((a, b) => a - b)
    .map((each) => ({ value: String(each), label: formatDuration(each) }))
}
