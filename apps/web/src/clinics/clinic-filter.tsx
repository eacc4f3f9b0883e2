import { Sentence, SelectWord } from '../ui/sentence'
import type { Filter } from './filter'
import { dayOf } from './filter'
import type { AcademyPage } from './queries'

const DAYS = ['Sundays', 'Mondays', 'Tuesdays', 'Wednesdays', 'Thursdays', 'Fridays', 'Saturdays']

/** The filter, read as a sentence. */
export function ClinicFilter(props: {
  page: AcademyPage
  filter: Filter
  onChange: (filter: Filter) => void
}) {
  const { page, filter, onChange } = props
  const set = (change: Partial<Filter>) => onChange({ ...filter, ...change })
  const days = [...new Set(page.clinics.map(dayOf))].sort()
  const coaches = [...new Set(page.clinics.flatMap((clinic) => clinic.coaches))].sort()
  return (
    <form aria-label="Filter clinics" className="pt-7" onSubmit={(event) => event.preventDefault()}>
      <Sentence>
        Show clinics for{' '}
        <SelectWord
          label="Age"
          value={filter.ages}
          onChange={(ages) => set({ ages })}
          options={[
            { value: '', label: 'all ages' },
            { value: 'adults', label: 'adults' },
            { value: 'juniors', label: 'juniors' },
          ]}
        />{' '}
        at{' '}
        <SelectWord
          label="Level"
          value={filter.level}
          onChange={(level) => set({ level })}
          options={[
            { value: '', label: 'any level' },
            { value: 'beginner', label: 'beginner level' },
            { value: 'middle', label: 'a middle handicap' },
            { value: 'low', label: 'a low handicap' },
          ]}
        />{' '}
        on{' '}
        <SelectWord
          label="Day"
          value={filter.day}
          onChange={(day) => set({ day })}
          options={[
            { value: '', label: 'any day' },
            ...days.map((day) => ({ value: day, label: DAYS[Number(day)] ?? '' })),
          ]}
        />{' '}
        with{' '}
        <SelectWord
          label="Coach"
          value={filter.coach}
          onChange={(coach) => set({ coach })}
          options={[
            { value: '', label: 'any coach' },
            ...coaches.map((coach) => ({ value: coach, label: coach })),
          ]}
        />
        ,{' '}
        <SelectWord
          label="Places"
          value={filter.full}
          onChange={(full) => set({ full })}
          options={[
            { value: '', label: 'full ones too' },
            { value: 'hide', label: 'with a place left' },
          ]}
        />
        .
      </Sentence>
    </form>
  )
}
