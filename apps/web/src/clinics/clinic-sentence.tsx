import { Fragment } from 'react'
import type { Answer } from '@marram/contract'
import { formatDuration } from '@marram/schedule/format'
import { InputWord, SelectWord, Sentence } from '../ui/sentence'
import type { Draft } from './draft'

type Venues = Answer<'venues.list'>['venues']
type Coaches = Answer<'coaches.list'>['coaches']

const DAYS = [
  { value: 'MO', label: 'Monday' },
  { value: 'TU', label: 'Tuesday' },
  { value: 'WE', label: 'Wednesday' },
  { value: 'TH', label: 'Thursday' },
  { value: 'FR', label: 'Friday' },
  { value: 'SA', label: 'Saturday' },
  { value: 'SU', label: 'Sunday' },
]

const DURATIONS = [30, 45, 50, 60, 75, 90, 120, 150, 180]

/** A clinic written as a sentence: every green word can be changed in place. */
export function ClinicSentence(props: {
  draft: Draft
  onChange: (change: Partial<Draft>) => void
  venues: Venues
  coaches: Coaches
}) {
  const { draft, onChange, venues, coaches } = props
  const venue = venues.find(({ id }) => id === draft.venueId) ?? venues[0]
  const area = venue?.areas.find(({ id }) => id === draft.areaId)
  const chooseDate = (startsOnLocal: string) => {
    const weekday = DAYS[(new Date(`${startsOnLocal}T12:00:00Z`).getUTCDay() + 6) % 7]?.value
    onChange({
      startsOnLocal,
      ...(weekday && draft.weekdays.length < 2 ? { weekdays: [weekday] } : {}),
    })
  }
  const chooseArea = (areaId: string) => {
    const chosen = venue?.areas.find(({ id }) => id === areaId)
    onChange({ areaId, fromUnit: '1', toUnit: String(chosen?.units ?? 1) })
  }
  return (
    <Sentence>
      <SelectWord
        label="How often"
        value={draft.interval}
        onChange={(interval) => onChange({ interval })}
        options={[
          { value: '1', label: 'Every' },
          { value: '2', label: 'Every second' },
          { value: '4', label: 'Every fourth' },
        ]}
      />{' '}
      <WeekdayWords weekdays={draft.weekdays} onChange={(weekdays) => onChange({ weekdays })} />{' '}
      from{' '}
      <InputWord label="First day" type="date" value={draft.startsOnLocal} onChange={chooseDate} />{' '}
      at{' '}
      <InputWord
        label="Start time"
        type="time"
        value={draft.startsAtLocal}
        onChange={(startsAtLocal) => onChange({ startsAtLocal })}
      />{' '}
      for{' '}
      <SelectWord
        label="Duration"
        value={draft.durationMinutes}
        onChange={(durationMinutes) => onChange({ durationMinutes })}
        options={durations(draft.durationMinutes).map((minutes) => ({
          value: String(minutes),
          label: formatDuration(minutes),
        }))}
      />
      ,{' '}
      <InputWord
        label="How many sessions"
        type="number"
        min={1}
        max={60}
        value={draft.sessions}
        onChange={(sessions) => onChange({ sessions })}
      />{' '}
      {draft.sessions === '1' ? 'session' : 'sessions'}. At{' '}
      <SelectWord
        label="Venue"
        value={venue?.id ?? ''}
        onChange={(venueId) => {
          const next = venues.find(({ id }) => id === venueId)
          const [first] = next?.areas ?? []
          onChange({
            venueId,
            areaId: first?.id ?? '',
            fromUnit: '1',
            toUnit: String(first?.units ?? 1),
          })
        }}
        options={venues.map(({ id, name }) => ({ value: id, label: name }))}
      />
      , on the{' '}
      <SelectWord
        label="Area"
        value={draft.areaId}
        onChange={chooseArea}
        options={(venue?.areas ?? []).map(({ id, name }) => ({ value: id, label: name }))}
      />
      {area && area.units > 1 && (
        <>
          {' '}
          bays{' '}
          <InputWord
            label="First bay"
            type="number"
            min={1}
            max={area.units}
            value={draft.fromUnit}
            onChange={(fromUnit) => onChange({ fromUnit })}
          />{' '}
          to{' '}
          <InputWord
            label="Last bay"
            type="number"
            min={1}
            max={area.units}
            value={draft.toUnit}
            onChange={(toUnit) => onChange({ toUnit })}
          />{' '}
          of {area.units}
        </>
      )}
      , with{' '}
      <SelectWord
        label="Coach"
        value={draft.coachIds[0] ?? ''}
        onChange={(coachId) =>
          onChange({
            coachIds: [coachId, ...draft.coachIds.slice(1).filter((id) => id !== coachId)],
          })
        }
        options={coaches.map(({ id, name }) => ({ value: id, label: name }))}
      />
      {coaches.length > 1 && (
        <>
          {' '}
          and{' '}
          <SelectWord
            label="Second coach"
            value={draft.coachIds[1] ?? ''}
            onChange={(second) =>
              onChange({ coachIds: [draft.coachIds[0] ?? '', second].filter(Boolean) })
            }
            options={[
              { value: '', label: 'nobody else' },
              ...coaches
                .filter(({ id }) => id !== draft.coachIds[0])
                .map(({ id, name }) => ({ value: id, label: name })),
            ]}
          />
        </>
      )}
      . For{' '}
      <InputWord
        label="How many golfers"
        type="number"
        min={1}
        max={200}
        value={draft.capacity}
        onChange={(capacity) => onChange({ capacity })}
      />{' '}
      golfers of{' '}
      <SelectWord
        label="Level"
        value={draft.level}
        onChange={(level) => onChange({ level: level as Draft['level'], from: '', to: '' })}
        options={[
          { value: 'any', label: 'any age and level' },
          { value: 'adults', label: 'adult age' },
          { value: 'juniors', label: 'junior age' },
          { value: 'handicap', label: 'a handicap' },
        ]}
      />
      {draft.level !== 'any' && (
        <>
          {' '}
          from{' '}
          <InputWord
            label="From"
            type="number"
            value={draft.from}
            onChange={(from) => onChange({ from })}
          />{' '}
          to{' '}
          <InputWord
            label="To"
            type="number"
            value={draft.to}
            onChange={(to) => onChange({ to })}
          />
        </>
      )}
      .{' '}
      <SelectWord
        label="Payment"
        value={draft.payMode}
        onChange={(payMode) => onChange({ payMode: payMode as Draft['payMode'] })}
        options={[
          { value: 'card', label: 'Paid by card' },
          { value: 'desk', label: 'Paid at the desk' },
          { value: 'free', label: 'Free' },
        ]}
      />
      , sold{' '}
      <SelectWord
        label="How it is sold"
        value={draft.saleMode}
        onChange={(saleMode) => onChange({ saleMode: saleMode as Draft['saleMode'] })}
        options={[
          { value: 'run', label: 'as a whole run' },
          { value: 'drop-in', label: 'session by session' },
          { value: 'both', label: 'either way' },
        ]}
      />
      {draft.payMode !== 'free' && draft.saleMode !== 'drop-in' && (
        <>
          {' '}
          at{' '}
          <InputWord
            label="Price of the run"
            value={draft.runPrice}
            placeholder="108.00"
            inputMode="decimal"
            onChange={(runPrice) => onChange({ runPrice })}
            isWrong={draft.runPrice === ''}
          />{' '}
          for the run
        </>
      )}
      {draft.payMode !== 'free' && draft.saleMode !== 'run' && (
        <>
          {' '}
          at{' '}
          <InputWord
            label="Price of one session"
            value={draft.dropInPrice}
            placeholder="18.00"
            inputMode="decimal"
            onChange={(dropInPrice) => onChange({ dropInPrice })}
            isWrong={draft.dropInPrice === ''}
          />{' '}
          a session
        </>
      )}
      .
    </Sentence>
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

function durations(current: string): number[] {
  const own = Number(current)
  return DURATIONS.includes(own) || !(own > 0)
    ? DURATIONS
    : [...DURATIONS, own].sort((a, b) => a - b)
}
